import { bandSums } from '../../evaluation/bandFigures';
import { exponential, meanLogarithm } from '../../figures/logarithms';
import { type CrossSpectra, effectiveAverages } from '../../spectra/crossSpectra';
import { multipleCoherence, unexplained } from './coherence';

/** What is left of a power, as a share of it, and the relative standard error of that share. */
export interface Share {
  left: number;
  error: number;
}

/** What a linear filter without limits leaves of the desired signal, as segments of one length show it. */
export interface RungFigure {
  segment: number;
  /** Effective averages. */
  averages: number;
  /** q. */
  inputs: number;
  total: Share;
  /** In the bands of the evaluation. */
  bands: Share[];
}

/** Frequencies side by side are related through the window: `1 + 2 ((2/3)² + (1/6)²)` for Hann's. */
const spread = 1 + 2 * (4 / 9 + 1 / 36);

/**
 * From the multiple coherence of inputs and their slopes: `Σ S_dd (1-γ²) / Σ S_dd`, freed of the bias of few averages.
 * @param spectra with slopes
 */
export function coherenceFigure(spectra: CrossSpectra): RungFigure {
  const averages = effectiveAverages(spectra);
  const inputs = spectra.signals - 1;
  const desired = spectra.between[inputs][inputs].re;
  const { values, ranks } = multipleCoherence(spectra);
  const taken = (1 + slopeTakes(spectra)) / 2;
  const left = desired.map((power, f) => power * unexplained(values[f], taken * ranks[f], averages));
  const degrees = Math.max(1, averages - taken * inputs);
  const share = (part: number, squares: number, whole: number): Share => ({
    left: whole > 0 ? part / whole : Number.NaN,
    error: part > 0 ? Math.sqrt((squares * spread) / degrees) / part : 0,
  });
  const squares = left.map((power) => power * power);
  const [lefts, alls, squareSums] = [left, desired, squares].map(bandSums);
  const total = [lefts, squareSums, alls].map((sums) => sums.reduce((a, b) => a + b, 0));
  return {
    segment: spectra.segment,
    averages,
    inputs,
    total: share(total[0], total[1], total[2]),
    bands: lefts.map((part, b) => share(part, squareSums[b], alls[b])),
  };
}

/**
 * What a slope takes of the averages beside what its input takes. Half-overlapped neighbours are related by c = 1/6
 * seen through Hann's window and by -1/2 through its slope; a response fitted to segments related by a and noise
 * related by b takes `1 + 2ab overlaps/K` segments of K.
 */
function slopeTakes({ averages, overlaps }: CrossSpectra): number {
  return averages === 0 ? 1 : (1 - overlaps / (6 * averages)) / (1 + overlaps / (18 * averages));
}

/**
 * For one-step prediction of the desired signal from its own past: `exp(mean ln S) / mean S` (Kolmogorov 1941, Szegő;
 * Hayes, *Statistical Digital Signal Processing and Modeling*, 1996, from memory). The error is white, which gives
 * the bands. The logarithm of an average of n segments is too small by `1/(2n) + 1/(12n²)` (digamma function).
 */
export function predictionFigure(spectra: CrossSpectra): RungFigure {
  const averages = effectiveAverages(spectra);
  const desired = spectra.between[spectra.signals - 1][spectra.signals - 1].re;
  // The bin at 0 holds what the removal of the mean left.
  const inner = desired.subarray(1);
  const mean = inner.reduce((sum, power) => sum + power, 0) / inner.length;
  const bias = 1 / (2 * averages) + 1 / (12 * averages * averages);
  const white = exponential(meanLogarithm(inner) + bias);
  const alls = bandSums(desired);
  const counts = bandSums(new Float64Array(desired.length).fill(1));
  return {
    segment: spectra.segment,
    averages,
    inputs: 1,
    total: {
      left: mean > 0 ? white / mean : Number.NaN,
      error: Math.sqrt(spread / (averages * inner.length)),
    },
    bands: alls.map((power, b) => ({
      left: power > 0 ? (white * counts[b]) / power : Number.NaN,
      error: Math.sqrt(spread / (averages * counts[b])),
    })),
  };
}

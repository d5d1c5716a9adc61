import { newSpectrum } from '../../statistics/blockSpectra';
import { cosineAt, quarterCosines } from '../../statistics/cosines';
import { frequencyAt, transformOf } from '../../statistics/transform';
import type { PairSpectra } from './pairSpectra';
import type { TrustedBins } from './trustedBins';

/** The strongest peak of the phase correlation. */
export interface PhasePeak {
  /** Samples, fractional: the desired signal follows the input by this beyond what was taken off before. */
  lag: number;
  /** 0..1: 1 where the phases of all bins are those of one pure delay. */
  height: number;
  /** Height of the highest other peak within {@link near} samples, such as the two sides of a resonance. */
  beside: number;
  /** Height of the highest other peak further off. */
  rival: number;
  /** Height that unrelated signals exceed with probability 1e-4; above 1 where too few bins count. */
  chance: number;
}

/** Points of the correlation between two samples. */
const fine = 4;
/** Points to which the peak is brought before its last step. */
const finest = 32;

/** Samples within which two peaks may belong to one arrival whose phase the path has turned. */
export const near = 3;

/** ln(1 / 1e-4). */
const surprise = 9.21;

/**
 * Peak of the generalised cross-correlation with phase transform (Knapp & Carter, IEEE Trans. ASSP 24, 1976) over the
 * bins that count: on a grid of a quarter sample, by the parabola through three of its points, and by one step of
 * Newton's method on the sum itself, which leaves an error below 1e-4 sample. Either sign, since a sensor may be wired
 * the other way round.
 * @param reach samples on either side in which the peak is looked for
 */
export function phasePeak(sums: PairSpectra, { bins, segment }: TrustedBins, reach = segment / 2): PhasePeak {
  const size = fine * segment;
  const { re, im } = newSpectrum(size);
  const phaseRe = new Float64Array(segment / 2 + 1);
  const phaseIm = new Float64Array(segment / 2 + 1);
  for (const f of bins) {
    const amplitude = Math.sqrt(sums.crossRe[f] * sums.crossRe[f] + sums.crossIm[f] * sums.crossIm[f]);
    if (!(amplitude > 0)) continue;
    phaseRe[f] = sums.crossRe[f] / amplitude;
    phaseIm[f] = sums.crossIm[f] / amplitude;
  }
  for (let p = 0; p < size; p++) {
    const frequency = frequencyAt(p, size);
    const f = Math.min(frequency, size - frequency);
    if (f > segment / 2) continue;
    re[p] = phaseRe[f];
    im[p] = frequency === f ? phaseIm[f] : -phaseIm[f];
  }
  transformOf(size).inverse(re, im);
  const unit = bins.length === 0 ? 0 : size / (2 * bins.length);
  const at = (k: number) => re[(k + size) % size] * unit;

  const edge = Math.floor(fine * reach);
  let best = 0;
  for (let k = -edge; k <= edge; k++) if (Math.abs(at(k)) > Math.abs(at(best))) best = k;
  // Hann segments correlate neighbouring bins: two count as one.
  const independent = bins.length / 2;
  const lag = (best + vertex(at(best - 1), at(best), at(best + 1))) / fine;
  return {
    lag: newtonStep(phaseRe, phaseIm, bins, segment, Math.round(lag * finest)),
    height: Math.abs(at(best)),
    ...otherPeaks(at, best, edge),
    chance: Math.sqrt((surprise + natural(2 * reach)) / independent),
  };
}

/** The maximum of Σ cos(φ_f + 2πf·lag/segment) next to `place / finest`, of |Σ| where it is a minimum. */
function newtonStep(
  re: Float64Array,
  im: Float64Array,
  bins: readonly number[],
  segment: number,
  place: number,
): number {
  const turn = finest * segment;
  const quarter = quarterCosines(turn);
  let slope = 0;
  let bend = 0;
  for (const f of bins) {
    const cosine = cosineAt(quarter, f * place);
    const sine = cosineAt(quarter, f * place - turn / 4);
    slope -= f * (im[f] * cosine + re[f] * sine);
    bend -= f * f * (re[f] * cosine - im[f] * sine);
  }
  const step = bend === 0 ? 0 : (-slope / bend) * (segment / (2 * Math.PI));
  // Further than the grid's width it is no step towards this peak.
  return place / finest + (Math.abs(step) < 1 / finest ? step : 0);
}

/** Where the parabola through three points at -1, 0 and 1 has its vertex. */
function vertex(before: number, middle: number, after: number): number {
  const bend = before - 2 * middle + after;
  return bend === 0 ? 0 : (0.5 * (before - after)) / bend;
}

/** The highest local extremes that are not the peak itself. */
function otherPeaks(
  at: (k: number) => number,
  best: number,
  edge: number,
): { beside: number; rival: number } {
  let beside = 0;
  let rival = 0;
  for (let k = -edge; k <= edge; k++) {
    const value = Math.abs(at(k));
    const distance = Math.abs(k - best);
    if (distance <= 1 || value < Math.abs(at(k - 1)) || value < Math.abs(at(k + 1))) continue;
    if (distance <= fine * near) beside = Math.max(beside, value);
    else rival = Math.max(rival, value);
  }
  return { beside, rival };
}

/** ln of a value from 1 up, 1 % high at most: 0.7 for each halving and an upper bound for the rest. */
function natural(value: number): number {
  let rest = value;
  let sum = 0;
  for (; rest >= 2; rest /= 2) sum += 0.7;
  return sum + (rest - 1) / Math.sqrt(rest);
}

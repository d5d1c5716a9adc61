import { normal95 } from '../confidence/tapErrors';
import { frequencyResponse, magnitudeDecibels } from '../figures/frequencyResponse';
import { type ComplexVariances, responseWithErrors } from '../figures/responseErrors';
import type { EvidenceView } from '../protocol/views';

/** Frequencies shown, 0 Hz to half the sample rate, both included. */
const points = 513;

/** Where the magnitude is this far below its largest, phase and delay are those of rounding errors. */
const faintest = 1e-7;

/**
 * Magnitude with its 95 % interval, phase and group delay of one input's taps.
 * @param taps newest-first
 * @param variances null where they are withheld
 */
export function responseView(
  label: string,
  taps: Float64Array,
  sampleRate: number,
  variances: ComplexVariances | null,
): EvidenceView['responses'][number] {
  const response = frequencyResponse(taps, points);
  const { real, imaginary } = response;
  const magnitudeDb = magnitudeDecibels(response);
  const highest = magnitudeDb.reduce((most, value) => Math.max(most, value), Number.NEGATIVE_INFINITY);
  const told = (f: number) => magnitudeDb[f] > highest + 20 * Math.log10(faintest);
  // -dφ/dω of Σ w z^k is the real part of Σ k w z^k over Σ w z^k.
  const slope = frequencyResponse(
    taps.map((w, k) => k * w),
    points,
  );
  const groupDelay = real.map((re, f) => {
    const im = imaginary[f];
    const power = re * re + im * im;
    return told(f) ? (slope.real[f] * re + slope.imaginary[f] * im) / power : Number.NaN;
  });
  return {
    label,
    frequencies: Float64Array.from({ length: points }, (_, f) => (f * sampleRate) / (2 * (points - 1))),
    magnitudeDb: magnitudeDb.map((value) => (Number.isFinite(value) ? value : Number.NaN)),
    ...interval(taps, variances),
    phase: real.map((re, f) => (told(f) ? (180 / Math.PI) * Math.atan2(imaginary[f], re) : Number.NaN)),
    groupDelay,
  };
}

/** The errors are known at fewer frequencies and follow smooth curves: between them they are joined by straight lines. */
function interval(taps: Float64Array, variances: ComplexVariances | null) {
  if (variances === null) return { lowDb: null, highDb: null };
  const { magnitudeError } = responseWithErrors(taps, variances);
  const { real, imaginary } = frequencyResponse(taps, points);
  const ratio = (magnitudeError.length - 1) / (points - 1);
  const edge = (sign: number) =>
    real.map((re, f) => {
      const place = f * ratio;
      const before = Math.min(magnitudeError.length - 2, Math.floor(place));
      const share = place - before;
      const error = (1 - share) * magnitudeError[before] + share * magnitudeError[before + 1];
      const magnitude = Math.hypot(re, imaginary[f]) + sign * normal95 * error;
      return magnitude > 0 ? 20 * Math.log10(magnitude) : Number.NaN;
    });
  return { lowDb: edge(-1), highDb: edge(1) };
}

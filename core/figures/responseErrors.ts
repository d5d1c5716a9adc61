import { frequencyResponse } from './frequencyResponse';

/** Variances of real and imaginary part of a response and their covariance, at evenly spaced frequencies. */
export interface ComplexVariances {
  real: Float64Array;
  imaginary: Float64Array;
  both: Float64Array;
}

/** Magnitude and phase of a response with their standard errors, from 0 Hz to half the sample rate. */
export interface ResponseWithErrors {
  magnitude: Float64Array;
  /** Of the magnitude, in its unit. */
  magnitudeError: Float64Array;
  /** Radians, -π to π. */
  phase: Float64Array;
  /** Radians; infinite where the magnitude is zero. */
  phaseError: Float64Array;
}

/**
 * By the delta method: along the response for its magnitude, across it for its phase. Good where the magnitude is several
 * times its error; where it is not, the phase is not known at all.
 * @param coefficients newest-first
 */
export function responseWithErrors(
  coefficients: ArrayLike<number>,
  { real: varRe, imaginary: varIm, both }: ComplexVariances,
): ResponseWithErrors {
  const { real, imaginary } = frequencyResponse(coefficients, varRe.length);
  const magnitude = real.map((re, i) => Math.hypot(re, imaginary[i]));
  const along = (i: number, re: number, im: number) =>
    Math.sqrt(Math.max(0, re * re * varRe[i] + im * im * varIm[i] + 2 * re * im * both[i]));
  return {
    magnitude,
    magnitudeError: magnitude.map((size, i) =>
      size > 0 ? along(i, real[i] / size, imaginary[i] / size) : Math.sqrt(varRe[i] + varIm[i]),
    ),
    phase: real.map((re, i) => Math.atan2(imaginary[i], re)),
    phaseError: magnitude.map((size, i) =>
      size > 0 ? along(i, -imaginary[i] / size, real[i] / size) / size : Number.POSITIVE_INFINITY,
    ),
  };
}

/** Standard error of a magnitude in dB, to first order; null where the magnitude cannot be told from zero (95 %). */
export function decibelError(magnitude: number, error: number): number | null {
  return magnitude > 1.96 * error ? (20 / Math.LN10) * (error / magnitude) : null;
}

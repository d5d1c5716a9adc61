import type { Pace } from '../pace';
import { frequencyAt } from '../statistics/transform';
import type { TapInfluence } from './bread';
import type { ScoreCovariance, Spectra } from './scoreCovariance';

/** Errors of the frequency response at `points` frequencies from 0 Hz to half the sample rate, both included. */
export interface ResponseErrors {
  points: number;
  /** One entry an input: variances of real and imaginary part and their covariance. */
  inputs: { real: Float64Array; imaginary: Float64Array; both: Float64Array }[];
}

/** Frequencies: the errors follow the spectra of input and residual, which are smooth beside the response. */
const points = 129;

/**
 * The response is linear in the taps, `H_r(f) = Σ_k w_r[k] (cos 2πfk - i sin 2πfk)`, so that its errors follow from theirs
 * exactly; what is shown of it (dB, degrees) follows by the delta method. How H_r(f) follows the data is the spectrum of
 * how the taps do, since the bread is symmetric: taps are brought one by one, with the spectra of their influence.
 * @param inputs K
 * @param length M
 */
export function gatherResponses(score: ScoreCovariance, inputs: number, length: number) {
  const { size } = score.transform;
  const places = Int32Array.from({ length: points }, (_, i) =>
    frequencyAt((i * size) / (2 * (points - 1)), size),
  );
  const rows = () => Array.from({ length: inputs }, () => new Float64Array(length));
  /** For input s and frequency i: what the real and the imaginary part of H_s take of the products at each lag. */
  const influences = Array.from({ length: inputs }, () =>
    Array.from({ length: points }, () => ({ real: rows(), imaginary: rows() })),
  );
  return {
    add(input: number, members: TapInfluence['members'], spectra: Spectra): void {
      for (let s = 0; s < inputs; s++) {
        for (let i = 0; i < points; i++) {
          const { real, imaginary } = influences[s][i];
          for (const { tap, sign } of members) {
            real[input][tap] = sign * spectra[s].re[places[i]];
            imaginary[input][tap] = sign * spectra[s].im[places[i]];
          }
        }
      }
    },
    /** @param samples L */
    async errors(samples: number, pace: Pace): Promise<ResponseErrors> {
      const found: ResponseErrors['inputs'] = [];
      for (const of of influences) {
        const entry = {
          real: new Float64Array(points),
          imaginary: new Float64Array(points),
          both: new Float64Array(points),
        };
        for (let i = 0; i < points; i++) {
          const real = score.spectrum(of[i].real);
          const imaginary = score.spectrum(of[i].imaginary);
          entry.real[i] = Math.max(0, score.form(real, real) / samples);
          entry.imaginary[i] = Math.max(0, score.form(imaginary, imaginary) / samples);
          entry.both[i] = score.form(real, imaginary) / samples;
          await pace.step('confidence bands', i, points);
        }
        found.push(entry);
      }
      return { points, inputs: found };
    },
  };
}

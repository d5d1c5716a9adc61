import { hyperbolicTangent, inverseTangent } from '../../figures/hyperbolic';
import { newHermitianSolver } from '../../solvers/hermitian';
import type { CrossSpectra } from '../../spectra/crossSpectra';
import { betaUpperPoint } from '../../statistics/betaDistribution';
import { newSpectrum, type Spectrum } from '../../statistics/blockSpectra';

/** What the inputs explain of the desired signal, frequency by frequency; as averaged, not corrected. */
export interface MultipleCoherence {
  /** γ², 0 to 1: the share of the desired signal's power that a linear filter of the inputs explains. */
  values: Float64Array;
  /** Inputs that did not depend on others there; 0 where the inputs are silent. */
  ranks: Uint8Array;
  /** H_r of each input: the filters that explain it, `S_xx⁻¹ S_xd`. */
  responses: Spectrum[];
}

/**
 * Multiple coherence of the desired (last) signal with all others (Bendat & Piersol, *Random Data*, ch. 7, from
 * memory): `γ² = S_xdᴴ S_xx⁻¹ S_xd / S_dd`. For one input the ordinary coherence.
 */
export function multipleCoherence({ between, signals }: CrossSpectra): MultipleCoherence {
  const inputs = signals - 1;
  const desired = between[inputs][inputs].re;
  const count = desired.length;
  const solver = newHermitianSolver(inputs);
  const responses = Array.from({ length: inputs }, () => newSpectrum(count));
  const values = new Float64Array(count);
  const ranks = new Uint8Array(count);
  for (let f = 0; f < count; f++) {
    for (let r = 0; r < inputs; r++) {
      for (let s = 0; s <= r; s++) {
        // Element (r, s) is E{ conj(X_r) X_s }, the conjugate of the one kept.
        solver.re[r * inputs + s] = between[s][r].re[f];
        solver.im[r * inputs + s] = -between[s][r].im[f];
      }
      solver.rightRe[r] = between[r][inputs].re[f];
      solver.rightIm[r] = between[r][inputs].im[f];
    }
    const { explained, rank } = solver.solve();
    values[f] = desired[f] > 0 ? Math.min(1, explained / desired[f]) : 0;
    ranks[f] = rank;
    for (let r = 0; r < inputs; r++) {
      responses[r].re[f] = solver.rightRe[r];
      responses[r].im[f] = solver.rightIm[r];
    }
  }
  return { values, ranks, responses };
}

/** Ordinary coherence of two of the signals, `|S_rs|² / (S_rr S_ss)`; 0 where one is silent. */
export function ordinaryCoherence({ between }: CrossSpectra, r: number, s: number): Float64Array {
  const cross = between[Math.min(r, s)][Math.max(r, s)];
  return cross.re.map((re, f) => {
    const powers = between[r][r].re[f] * between[s][s].re[f];
    return powers > 0 ? Math.min(1, (re * re + cross.im[f] * cross.im[f]) / powers) : 0;
  });
}

/**
 * `1 - γ²` without the bias of few averages: fitting q responses to n segments explains q/n of what is unrelated, so
 * that the residual power is n/(n-q) times the averaged one. Can exceed 1.
 * @param averages n, effective
 */
export function unexplained(coherence: number, inputs: number, averages: number): number {
  return averages > inputs ? ((1 - coherence) * averages) / (averages - inputs) : 1;
}

const level = 0.05;

/**
 * The coherence that unrelated signals exceed at one frequency in twenty: upper 5 % point of Beta(q, n - q), for one
 * input `1 - 0.05^(1/(n-1))` (Carter, Knapp & Nuttall, IEEE Trans. Audio Electroacoust. 21, 1973, from memory).
 * @param inputs q
 * @param averages n, effective; 1 is returned where it is not above q
 */
export function significance(inputs: number, averages: number): number {
  return betaUpperPoint(level, inputs, averages - inputs);
}

/** Standard deviations that hold 95 % of a normal variate. */
const deviations = 1.959963984540054;

/**
 * 95 % confidence interval of the true coherence: `atanh γ` is about normal with variance 1/(2n) (Fisher's
 * transformation; Enochson & Goodman 1965, from memory), its mean mended for the q responses that were fitted. Holds
 * for n of 20 and more; where the estimate is not significant the interval begins at 0.
 */
export function coherenceInterval(
  coherence: number,
  inputs: number,
  averages: number,
): { from: number; to: number } {
  if (!(averages > inputs + 1)) return { from: 0, to: 1 };
  // The largest double below 1 keeps the transformation finite.
  const root = Math.min(Math.sqrt(coherence), 1 - 1.1102230246251565e-16);
  const bias = (2 * inputs * (1 - coherence) - 1 + 3 * coherence) / (4 * averages * Math.max(root, 1e-3));
  const middle = inverseTangent(root) - bias;
  const half = deviations / Math.sqrt(2 * averages);
  const square = (w: number) => {
    const value = hyperbolicTangent(Math.max(0, w));
    return value * value;
  };
  return {
    from: coherence > significance(inputs, averages) ? square(middle - half) : 0,
    to: square(middle + half),
  };
}

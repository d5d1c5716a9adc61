import { sizeFor, type Transform, transformOf } from '../statistics/transform';
import type { ResidualSums } from './residualSums';
import { scoreSequences } from './scoreSequence';

/**
 * Covariance S of `x_r[n-k] e[n]`, summed over all lags in n, as a quadratic form over lags k of every input: the meat of
 * the sandwich. It is block Toeplitz, so that it is applied by transforms.
 */
export interface ScoreCovariance {
  readonly transform: Transform;
  /** Spectra of values over at most the lags asked for, one row an input, in the order of the transform. */
  spectrum(rows: readonly Float64Array[]): Spectra;
  /** `uᵀ S v` */
  form(u: Spectra, v: Spectra): number;
  /** S v over the lags asked for, one row an input. */
  apply(v: Spectra): Float64Array[];
  /** Of `(1/L) Σ x_r[n-k] e[n]` times √L, the same for every lag. */
  deviation(r: number): number;
}

/** One complex spectrum an input. */
export type Spectra = readonly { re: Float64Array; im: Float64Array }[];

/**
 * The spectral form: where the residual is independent of the inputs, `S_rs[k,l] = Σ_j r_e[j] c_rs[k-l-j]`, r_e and c_rs
 * being the correlations of residual and inputs. It needs these alone, where the estimate of Newey & West (*Econometrica*
 * 55, 1987) would need a sum of K·M by K·M products for every sample, and it is much steadier. As theirs it takes r_e
 * through a lag window: Parzen's, which keeps S from being negative and lets little of a strong band of the residual leak
 * into a weak one (Andrews, *Econometrica* 59, 1991). S is taken over each part of the data by itself, so that levels of
 * input and residual which rise and fall together count. It does not see a residual that depends on the inputs: whether it
 * does is what the tests of the residual tell.
 * @param window lags at which Parzen's window reaches zero; the sums must have `lags + window` of them
 * @param lags of S, for each input
 * @param freedom number of unknowns fitted, fewer than the samples of the fit: the residual is too small by their share
 */
export function scoreCovariance(
  { parts, samples }: ResidualSums,
  window: number,
  lags: number,
  freedom: number,
): ScoreCovariance {
  const inputs = parts[0].inputs - 1;
  const size = sizeFor(2 * lags, 512);
  const transform = transformOf(size);
  const empty = () => ({ re: new Float64Array(size), im: new Float64Array(size) });
  const unit = samples / (samples - freedom);
  const sequences = scoreSequences({ parts }, window, lags);
  const deviations = sequences.map((row, r) => Math.sqrt(Math.max(0, unit * row[r][lags - 1])));
  const blocks = sequences.map((row) =>
    row.map((sequence) => {
      const block = empty();
      for (let lag = 1 - lags; lag < lags; lag++) {
        block.re[lag < 0 ? size + lag : lag] = unit * sequence[lags - 1 + lag];
      }
      transform.forward(block.re, block.im);
      return block;
    }),
  );

  return {
    transform,
    spectrum: (rows) =>
      rows.map((row) => {
        const { re, im } = empty();
        re.set(row);
        transform.forward(re, im);
        return { re, im };
      }),
    form(u, v) {
      let sum = 0;
      for (let r = 0; r < inputs; r++) {
        for (let s = 0; s < inputs; s++) sum += realProduct(u[r], blocks[r][s], v[s]);
      }
      return sum / size;
    },
    apply: (v) =>
      blocks.map((row) => {
        const { re, im } = empty();
        for (let s = 0; s < inputs; s++) addProduct(re, im, row[s], v[s]);
        transform.inverse(re, im);
        return re.slice(0, lags);
      }),
    deviation: (r) => deviations[r],
  };
}

type Spectrum = Spectra[number];

/** Real part of `Σ_f conj(u) s v`; of real sequences the whole sum is real. */
function realProduct(u: Spectrum, s: Spectrum, v: Spectrum): number {
  let sum = 0;
  for (let f = 0; f < s.re.length; f++) {
    const re = u.re[f] * v.re[f] + u.im[f] * v.im[f];
    const im = u.re[f] * v.im[f] - u.im[f] * v.re[f];
    sum += s.re[f] * re - s.im[f] * im;
  }
  return sum;
}

function addProduct(re: Float64Array, im: Float64Array, a: Spectrum, b: Spectrum): void {
  for (let f = 0; f < re.length; f++) {
    re[f] += a.re[f] * b.re[f] - a.im[f] * b.im[f];
    im[f] += a.re[f] * b.im[f] + a.im[f] * b.re[f];
  }
}

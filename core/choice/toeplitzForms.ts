import type { Spectrum } from '../statistics/blockSpectra';

/**
 * `uᵀ T u` and `vᵀ T v` from the spectra Z of u + iv: their sum is `Σ_f Zᴴ S Z`, their difference `Σ_f Z(-f)ᵀ S Z(f)`.
 * @param given Z of each input, in bit-reversed order
 * @param blocks `[r][s]`: spectrum of the circulant matrix that block (r, s) of the symmetric matrix T is the corner of
 */
export function toeplitzForms(
  given: readonly Spectrum[],
  blocks: readonly (readonly Spectrum[])[],
): [number, number] {
  let sum = 0;
  let difference = 0;
  const note = (weight: number, [more, apart]: [number, number]) => {
    sum += weight * more;
    difference += weight * apart;
  };
  for (let r = 0; r < given.length; r++) {
    note(0.5, ownForms(given[r], blocks[r][r].re));
    for (let s = 0; s < r; s++) note(1, mixedForms(given[r], blocks[r][s], given[s]));
  }
  const size = given[0].re.length;
  return [(sum + difference) / size, (sum - difference) / size];
}

// In a bit-reversed spectrum places 0 and 1 are their own mirrors; from 2 on those of an octave run towards each other.

/** Sum and difference of one input, S real and even. */
function ownForms({ re, im }: Spectrum, s: Float64Array): [number, number] {
  let sum = 0;
  let difference = 0;
  for (let p = 0; p < 2; p++) {
    sum += s[p] * (re[p] * re[p] + im[p] * im[p]);
    difference += s[p] * (re[p] * re[p] - im[p] * im[p]);
  }
  for (let octave = 2; octave < re.length; octave *= 2) {
    for (let p = octave, q = 2 * octave - 1; p < q; p++, q--) {
      sum += s[p] * (re[p] * re[p] + im[p] * im[p] + (re[q] * re[q] + im[q] * im[q]));
      difference += 2 * s[p] * (re[p] * re[q] - im[p] * im[q]);
    }
  }
  return [sum, difference];
}

/** The same of two inputs, real parts. */
function mixedForms(a: Spectrum, s: Spectrum, b: Spectrum): [number, number] {
  let sum = 0;
  let difference = 0;
  const add = (p: number, q: number) => {
    const re = s.re[p] * b.re[p] - s.im[p] * b.im[p];
    const im = s.re[p] * b.im[p] + s.im[p] * b.re[p];
    sum += a.re[p] * re + a.im[p] * im;
    difference += a.re[q] * re - a.im[q] * im;
  };
  add(0, 0);
  add(1, 1);
  for (let octave = 2; octave < a.re.length; octave *= 2) {
    for (let p = octave; p < 2 * octave; p++) add(p, 3 * octave - 1 - p);
  }
  return [sum, difference];
}

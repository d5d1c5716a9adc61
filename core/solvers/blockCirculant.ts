import { newSpectrum } from '../statistics/blockSpectra';
import { sizeFor, transformOf } from '../statistics/transform';
import type { Operator } from './conditionNumber';
import { newHermitianSolver } from './hermitian';

/**
 * The inverse of the block circulant matrix nearest to a symmetric positive definite block Toeplitz matrix: that of
 * {@link circulantInverse} for several inputs, a small Hermitian system at every frequency (T. Chan & Olkin, *Numer.
 * Algorithms* 6, 1994, from memory). Unknowns stand input by input.
 * @param columns `[r][s][k]`: first columns of the blocks
 */
export function blockCirculantInverse(columns: readonly (readonly Float64Array[])[]): Operator {
  const inputs = columns.length;
  const length = columns[0][0].length;
  const size = sizeFor(length, 8);
  const transform = transformOf(size);
  const inverses = invertedBlocks(columns, size);
  const given = Array.from({ length: inputs }, () => newSpectrum(size));
  const product = newSpectrum(size);
  return (vector, into = new Float64Array(inputs * length)) => {
    given.forEach(({ re, im }, r) => {
      re.set(vector.subarray(r * length, (r + 1) * length));
      re.fill(0, length);
      im.fill(0);
      transform.forward(re, im);
    });
    for (let r = 0; r < inputs; r++) {
      product.re.fill(0);
      product.im.fill(0);
      for (let s = 0; s < inputs; s++) {
        const block = inverses[r * inputs + s];
        const { re, im } = given[s];
        for (let p = 0; p < size; p++) {
          product.re[p] += block.re[p] * re[p] - block.im[p] * im[p];
          product.im[p] += block.re[p] * im[p] + block.im[p] * re[p];
        }
      }
      transform.inverse(product.re, product.im);
      into.set(product.re.subarray(0, length), r * length);
    }
    return into;
  };
}

/** Spectra of the elements of the inverse, row by row. */
function invertedBlocks(columns: readonly (readonly Float64Array[])[], size: number) {
  const inputs = columns.length;
  const length = columns[0][0].length;
  const transform = transformOf(size);
  const blocks = Array.from({ length: inputs * inputs }, (_, at) => {
    const s = at % inputs;
    const r = (at - s) / inputs;
    const spectrum = newSpectrum(size);
    for (let k = 0; k < length; k++) {
      const share = 1 - k / length;
      spectrum.re[k] += share * columns[r][s][k];
      // Lag -k; what lies further apart than the circle is long meets what has come round.
      if (k > 0) spectrum.re[size - k] += share * columns[s][r][k];
    }
    transform.forward(spectrum.re, spectrum.im);
    return spectrum;
  });
  const solver = newHermitianSolver(inputs);
  for (let p = 0; p < size; p++) {
    const re = blocks.map((block) => block.re[p]);
    const im = blocks.map((block) => block.im[p]);
    for (let s = 0; s < inputs; s++) {
      solver.re.set(re);
      solver.im.set(im);
      solver.rightRe.fill(0);
      solver.rightIm.fill(0);
      solver.rightRe[s] = 1;
      solver.solve();
      for (let r = 0; r < inputs; r++) {
        blocks[r * inputs + s].re[p] = solver.rightRe[r];
        blocks[r * inputs + s].im[p] = solver.rightIm[r];
      }
    }
  }
  return blocks;
}

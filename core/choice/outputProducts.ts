import type { Spectrum } from '../statistics/blockSpectra';
import { correlateEdge, type OutputTables, transformTwo } from './outputTables';

/**
 * `R u` and `R v` of two vectors over the taps of a length and one more, tap by tap. R is continued to the tap more by its
 * shift updates; where the sums end there, its first row gets a zero.
 * Error about 1e-15 of the norm times the largest sum.
 */
export function outputProducts(
  tables: OutputTables,
  [u, v]: readonly Float64Array[],
  length: number,
  [intoU, intoV]: readonly Float64Array[],
): void {
  const { inputs, transform, given, blocks, edges, scratch, sums } = tables;
  transformTwo(tables, u, v, length + 1);
  for (let r = 0; r < inputs; r++) {
    sums[r].re.fill(0);
    sums[r].im.fill(0);
    for (let s = 0; s < inputs; s++) addProduct(sums[r], blocks[r][s], given[s], 1);
  }
  for (const { sign, rows } of edges) {
    correlateEdge(tables, rows);
    for (const part of [scratch.re, scratch.im]) {
      part[0] = 0;
      part.fill(0, length + 1);
    }
    transform.forward(scratch.re, scratch.im);
    for (let r = 0; r < inputs; r++) addProduct(sums[r], rows[r], scratch, sign);
  }
  for (let r = 0; r < inputs; r++) {
    const { re, im } = sums[r];
    transform.inverse(re, im);
    for (let k = 0; k <= length; k++) {
      intoU[k * inputs + r] = re[k];
      intoV[k * inputs + r] = im[k];
    }
  }
}

/** Adds `sign a b`. */
function addProduct({ re, im }: Spectrum, a: Spectrum, b: Spectrum, sign: number): void {
  const { re: aRe, im: aIm } = a;
  const { re: bRe, im: bIm } = b;
  for (let p = 0; p < re.length; p++) {
    const x = sign * bRe[p];
    const y = sign * bIm[p];
    re[p] += aRe[p] * x - aIm[p] * y;
    im[p] += aRe[p] * y + aIm[p] * x;
  }
}

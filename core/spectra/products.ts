import type { Spectrum } from '../statistics/blockSpectra';

// The sums over segments on which a pass over a recording spends its time beside the transforms.

/** `sum += |X|²`. */
export function addPower(sum: Float64Array, { re, im }: Spectrum): void {
  for (let h = 0; h < sum.length; h++) sum[h] += re[h] * re[h] + im[h] * im[h];
}

/** `power += |Y|²` and `product += conj(X) Y` in one go. */
export function addPowerAndProduct(power: Float64Array, product: Spectrum, x: Spectrum, y: Spectrum): void {
  const { re, im } = product;
  const { re: xRe, im: xIm } = x;
  const { re: yRe, im: yIm } = y;
  for (let h = 0; h < power.length; h++) {
    power[h] += yRe[h] * yRe[h] + yIm[h] * yIm[h];
    re[h] += xRe[h] * yRe[h] + xIm[h] * yIm[h];
    im[h] += xRe[h] * yIm[h] - xIm[h] * yRe[h];
  }
}

/** `product += conj(X) Y`. */
export function addProduct({ re, im }: Spectrum, x: Spectrum, y: Spectrum): void {
  const { re: xRe, im: xIm } = x;
  const { re: yRe, im: yIm } = y;
  for (let h = 0; h < re.length; h++) {
    re[h] += xRe[h] * yRe[h] + xIm[h] * yIm[h];
    im[h] += xRe[h] * yIm[h] - xIm[h] * yRe[h];
  }
}

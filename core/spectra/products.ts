import type { Spectrum } from '../statistics/blockSpectra';

// The sums over segments on which a pass over a recording spends its time beside the transforms.

// Every part is read into a constant once: engines that do not see that a typed array's element has been read before would
// read it again.

/** `sum += |X|²`. */
export function addPower(sum: Float64Array, { re, im }: Spectrum): void {
  for (let h = 0; h < sum.length; h++) {
    const x = re[h];
    const y = im[h];
    sum[h] += x * x + y * y;
  }
}

/** `power += |Y|²` and `product += conj(X) Y` in one go. */
export function addPowerAndProduct(power: Float64Array, product: Spectrum, x: Spectrum, y: Spectrum): void {
  const { re, im } = product;
  const { re: xRe, im: xIm } = x;
  const { re: yRe, im: yIm } = y;
  for (let h = 0; h < power.length; h++) {
    const a = xRe[h];
    const b = xIm[h];
    const c = yRe[h];
    const d = yIm[h];
    power[h] += c * c + d * d;
    re[h] += a * c + b * d;
    im[h] += a * d - b * c;
  }
}

/** `product += conj(X) Y`. */
export function addProduct({ re, im }: Spectrum, x: Spectrum, y: Spectrum): void {
  const { re: xRe, im: xIm } = x;
  const { re: yRe, im: yIm } = y;
  for (let h = 0; h < re.length; h++) {
    const a = xRe[h];
    const b = xIm[h];
    const c = yRe[h];
    const d = yIm[h];
    re[h] += a * c + b * d;
    im[h] += a * d - b * c;
  }
}

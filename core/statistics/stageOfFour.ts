// Two radix-2 stages in one pass over the data.

/**
 * Forward stage of n points, decimation in frequency (Gentleman & Sande): four results in bit-reversed order.
 * @param table w^j, w^2j, w^3j (w = exp(-2πi/n)), six numbers for each j < n/4
 */
export function forwardFour(re: Float64Array, im: Float64Array, n: number, table: Float64Array): void {
  const q = n >> 2;
  const size = re.length;
  for (let base = 0; base < size; base += n) {
    for (let j = 0, t = 0; j < q; j++, t += 6) {
      const p0 = base + j;
      const p1 = p0 + q;
      const p2 = p1 + q;
      const p3 = p2 + q;
      const aRe = re[p0];
      const aIm = im[p0];
      const bRe = re[p1];
      const bIm = im[p1];
      const cRe = re[p2];
      const cIm = im[p2];
      const dRe = re[p3];
      const dIm = im[p3];
      const sumRe = aRe + cRe;
      const sumIm = aIm + cIm;
      const oddRe = bRe + dRe;
      const oddIm = bIm + dIm;
      const gapRe = aRe - cRe;
      const gapIm = aIm - cIm;
      const sideRe = bIm - dIm;
      const sideIm = dRe - bRe;
      re[p0] = sumRe + oddRe;
      im[p0] = sumIm + oddIm;
      let x = sumRe - oddRe;
      let y = sumIm - oddIm;
      let c = table[t + 2];
      let s = table[t + 3];
      re[p1] = x * c - y * s;
      im[p1] = x * s + y * c;
      x = gapRe + sideRe;
      y = gapIm + sideIm;
      c = table[t];
      s = table[t + 1];
      re[p2] = x * c - y * s;
      im[p2] = x * s + y * c;
      x = gapRe - sideRe;
      y = gapIm - sideIm;
      c = table[t + 4];
      s = table[t + 5];
      re[p3] = x * c - y * s;
      im[p3] = x * s + y * c;
    }
  }
}

/**
 * The way back of {@link forwardFour} (Cooley & Tukey), without its factor 1/4.
 * @param table the same
 */
export function inverseFour(re: Float64Array, im: Float64Array, n: number, table: Float64Array): void {
  const q = n >> 2;
  const size = re.length;
  for (let base = 0; base < size; base += n) {
    for (let j = 0, t = 0; j < q; j++, t += 6) {
      const p0 = base + j;
      const p1 = p0 + q;
      const p2 = p1 + q;
      const p3 = p2 + q;
      let inRe = re[p1];
      let inIm = im[p1];
      let c = table[t + 2];
      let s = table[t + 3];
      const t1Re = inRe * c + inIm * s;
      const t1Im = inIm * c - inRe * s;
      inRe = re[p2];
      inIm = im[p2];
      c = table[t];
      s = table[t + 1];
      const t2Re = inRe * c + inIm * s;
      const t2Im = inIm * c - inRe * s;
      inRe = re[p3];
      inIm = im[p3];
      c = table[t + 4];
      s = table[t + 5];
      const t3Re = inRe * c + inIm * s;
      const t3Im = inIm * c - inRe * s;
      const aRe = re[p0];
      const aIm = im[p0];
      const b0Re = aRe + t1Re;
      const b0Im = aIm + t1Im;
      const b1Re = aRe - t1Re;
      const b1Im = aIm - t1Im;
      const evenRe = t2Re + t3Re;
      const evenIm = t2Im + t3Im;
      const oddRe = t3Im - t2Im;
      const oddIm = t2Re - t3Re;
      re[p0] = b0Re + evenRe;
      im[p0] = b0Im + evenIm;
      re[p2] = b0Re - evenRe;
      im[p2] = b0Im - evenIm;
      re[p1] = b1Re + oddRe;
      im[p1] = b1Im + oddIm;
      re[p3] = b1Re - oddRe;
      im[p3] = b1Im - oddIm;
    }
  }
}

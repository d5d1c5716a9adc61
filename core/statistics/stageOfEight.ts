// Three radix-2 stages in one pass over the data. Every part is read into a constant once: engines that do not see that a
// typed array's element has been read before would read it again.

/** √½: the eighth root of one has it as real and imaginary part. */
const root = Math.sqrt(0.5);

/**
 * Forward stage of n points, decimation in frequency (Gentleman & Sande): three radix-2 stages, eight results in
 * bit-reversed order.
 * @param table w^j … w^7j (w = exp(-2πi/n)), fourteen numbers for each j < n/8
 */
export function forwardEight(re: Float64Array, im: Float64Array, n: number, table: Float64Array): void {
  const q = n >> 3;
  const size = re.length;
  for (let base = 0; base < size; base += n) {
    for (let j = 0, t = 0; j < q; j++, t += 14) {
      const p0 = base + j;
      const p1 = p0 + q;
      const p2 = p1 + q;
      const p3 = p2 + q;
      const p4 = p3 + q;
      const p5 = p4 + q;
      const p6 = p5 + q;
      const p7 = p6 + q;
      const a0Re = re[p0];
      const a0Im = im[p0];
      const a1Re = re[p1];
      const a1Im = im[p1];
      const a2Re = re[p2];
      const a2Im = im[p2];
      const a3Re = re[p3];
      const a3Im = im[p3];
      const a4Re = re[p4];
      const a4Im = im[p4];
      const a5Re = re[p5];
      const a5Im = im[p5];
      const a6Re = re[p6];
      const a6Im = im[p6];
      const a7Re = re[p7];
      const a7Im = im[p7];
      // The even frequencies: sums.
      let evenRe = a0Re + a4Re + (a2Re + a6Re);
      let evenIm = a0Im + a4Im + (a2Im + a6Im);
      let oddRe = a1Re + a5Re + (a3Re + a7Re);
      let oddIm = a1Im + a5Im + (a3Im + a7Im);
      re[p0] = evenRe + oddRe;
      im[p0] = evenIm + oddIm;
      let x = evenRe - oddRe;
      let y = evenIm - oddIm;
      let c = table[t + 6];
      let s = table[t + 7];
      re[p1] = x * c - y * s;
      im[p1] = x * s + y * c;
      evenRe = a0Re + a4Re - (a2Re + a6Re);
      evenIm = a0Im + a4Im - (a2Im + a6Im);
      oddRe = a1Im + a5Im - (a3Im + a7Im);
      oddIm = a3Re + a7Re - (a1Re + a5Re);
      x = evenRe + oddRe;
      y = evenIm + oddIm;
      c = table[t + 2];
      s = table[t + 3];
      re[p2] = x * c - y * s;
      im[p2] = x * s + y * c;
      x = evenRe - oddRe;
      y = evenIm - oddIm;
      c = table[t + 10];
      s = table[t + 11];
      re[p3] = x * c - y * s;
      im[p3] = x * s + y * c;
      // The odd ones: differences, turned by eighths.
      const d1Re = a1Re - a5Re;
      const d1Im = a1Im - a5Im;
      const d3Re = a3Re - a7Re;
      const d3Im = a3Im - a7Im;
      const b1Re = root * (d1Re + d1Im);
      const b1Im = root * (d1Im - d1Re);
      const b3Re = root * (d3Im - d3Re);
      const b3Im = -root * (d3Re + d3Im);
      evenRe = a0Re - a4Re + (a2Im - a6Im);
      evenIm = a0Im - a4Im + (a6Re - a2Re);
      oddRe = b1Re + b3Re;
      oddIm = b1Im + b3Im;
      x = evenRe + oddRe;
      y = evenIm + oddIm;
      c = table[t];
      s = table[t + 1];
      re[p4] = x * c - y * s;
      im[p4] = x * s + y * c;
      x = evenRe - oddRe;
      y = evenIm - oddIm;
      c = table[t + 8];
      s = table[t + 9];
      re[p5] = x * c - y * s;
      im[p5] = x * s + y * c;
      evenRe = a0Re - a4Re - (a2Im - a6Im);
      evenIm = a0Im - a4Im - (a6Re - a2Re);
      oddRe = b1Im - b3Im;
      oddIm = b3Re - b1Re;
      x = evenRe + oddRe;
      y = evenIm + oddIm;
      c = table[t + 4];
      s = table[t + 5];
      re[p6] = x * c - y * s;
      im[p6] = x * s + y * c;
      x = evenRe - oddRe;
      y = evenIm - oddIm;
      c = table[t + 12];
      s = table[t + 13];
      re[p7] = x * c - y * s;
      im[p7] = x * s + y * c;
    }
  }
}

/**
 * The way back of {@link forwardEight} (Cooley & Tukey), without its factor 1/8.
 * @param table the same
 */
export function inverseEight(re: Float64Array, im: Float64Array, n: number, table: Float64Array): void {
  const q = n >> 3;
  const size = re.length;
  for (let base = 0; base < size; base += n) {
    for (let j = 0, t = 0; j < q; j++, t += 14) {
      const p0 = base + j;
      const p1 = p0 + q;
      const p2 = p1 + q;
      const p3 = p2 + q;
      const p4 = p3 + q;
      const p5 = p4 + q;
      const p6 = p5 + q;
      const p7 = p6 + q;
      const y0Re = re[p0];
      const y0Im = im[p0];
      const in1Re = re[p1];
      const in1Im = im[p1];
      const c4 = table[t + 6];
      const s4 = table[t + 7];
      const y1Re = in1Re * c4 + in1Im * s4;
      const y1Im = in1Im * c4 - in1Re * s4;
      const in2Re = re[p2];
      const in2Im = im[p2];
      const c2 = table[t + 2];
      const s2 = table[t + 3];
      const y2Re = in2Re * c2 + in2Im * s2;
      const y2Im = in2Im * c2 - in2Re * s2;
      const in3Re = re[p3];
      const in3Im = im[p3];
      const c6 = table[t + 10];
      const s6 = table[t + 11];
      const y3Re = in3Re * c6 + in3Im * s6;
      const y3Im = in3Im * c6 - in3Re * s6;
      const in4Re = re[p4];
      const in4Im = im[p4];
      const c1 = table[t];
      const s1 = table[t + 1];
      const y4Re = in4Re * c1 + in4Im * s1;
      const y4Im = in4Im * c1 - in4Re * s1;
      const in5Re = re[p5];
      const in5Im = im[p5];
      const c5 = table[t + 8];
      const s5 = table[t + 9];
      const y5Re = in5Re * c5 + in5Im * s5;
      const y5Im = in5Im * c5 - in5Re * s5;
      const in6Re = re[p6];
      const in6Im = im[p6];
      const c3 = table[t + 4];
      const s3 = table[t + 5];
      const y6Re = in6Re * c3 + in6Im * s3;
      const y6Im = in6Im * c3 - in6Re * s3;
      const in7Re = re[p7];
      const in7Im = im[p7];
      const c7 = table[t + 12];
      const s7 = table[t + 13];
      const y7Re = in7Re * c7 + in7Im * s7;
      const y7Im = in7Im * c7 - in7Re * s7;
      const s0Re = y0Re + y1Re;
      const s0Im = y0Im + y1Im;
      const s1Re = y0Re - y1Re;
      const s1Im = y0Im - y1Im;
      const g0Re = y2Re + y3Re;
      const g0Im = y2Im + y3Im;
      const g1Re = y3Im - y2Im;
      const g1Im = y2Re - y3Re;
      const b0Re = s0Re + g0Re;
      const b0Im = s0Im + g0Im;
      const b2Re = s0Re - g0Re;
      const b2Im = s0Im - g0Im;
      const b1Re = s1Re + g1Re;
      const b1Im = s1Im + g1Im;
      const b3Re = s1Re - g1Re;
      const b3Im = s1Im - g1Im;
      const u0Re = y4Re + y5Re;
      const u0Im = y4Im + y5Im;
      const u1Re = y4Re - y5Re;
      const u1Im = y4Im - y5Im;
      const v0Re = y6Re + y7Re;
      const v0Im = y6Im + y7Im;
      const v1Re = y7Im - y6Im;
      const v1Im = y6Re - y7Re;
      const b4Re = u0Re + v0Re;
      const b4Im = u0Im + v0Im;
      const b6Re = v0Im - u0Im;
      const b6Im = u0Re - v0Re;
      const e5Re = u1Re + v1Re;
      const e5Im = u1Im + v1Im;
      const e7Re = u1Re - v1Re;
      const e7Im = u1Im - v1Im;
      const b5Re = root * (e5Re - e5Im);
      const b5Im = root * (e5Re + e5Im);
      const b7Re = -root * (e7Re + e7Im);
      const b7Im = root * (e7Re - e7Im);
      re[p0] = b0Re + b4Re;
      im[p0] = b0Im + b4Im;
      re[p4] = b0Re - b4Re;
      im[p4] = b0Im - b4Im;
      re[p1] = b1Re + b5Re;
      im[p1] = b1Im + b5Im;
      re[p5] = b1Re - b5Re;
      im[p5] = b1Im - b5Im;
      re[p2] = b2Re + b6Re;
      im[p2] = b2Im + b6Im;
      re[p6] = b2Re - b6Re;
      im[p6] = b2Im - b6Im;
      re[p3] = b3Re + b7Re;
      im[p3] = b3Im + b7Im;
      re[p7] = b3Re - b7Re;
      im[p7] = b3Im - b7Im;
    }
  }
}

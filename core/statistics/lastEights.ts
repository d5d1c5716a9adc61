// The stage of eight points at the end of a forward transform and at the beginning of the way back, whose factors are all 1.

/** √½: the eighth root of one has it as real and imaginary part. */
const root = Math.sqrt(0.5);

/** The last forward stage: eight points each, in bit-reversed order. */
export function forwardLastEight(re: Float64Array, im: Float64Array): void {
  const size = re.length;
  for (let p = 0; p < size; p += 8) {
    const a0Re = re[p];
    const a0Im = im[p];
    const a1Re = re[p + 1];
    const a1Im = im[p + 1];
    const a2Re = re[p + 2];
    const a2Im = im[p + 2];
    const a3Re = re[p + 3];
    const a3Im = im[p + 3];
    const a4Re = re[p + 4];
    const a4Im = im[p + 4];
    const a5Re = re[p + 5];
    const a5Im = im[p + 5];
    const a6Re = re[p + 6];
    const a6Im = im[p + 6];
    const a7Re = re[p + 7];
    const a7Im = im[p + 7];
    let evenRe = a0Re + a4Re + (a2Re + a6Re);
    let evenIm = a0Im + a4Im + (a2Im + a6Im);
    let oddRe = a1Re + a5Re + (a3Re + a7Re);
    let oddIm = a1Im + a5Im + (a3Im + a7Im);
    re[p] = evenRe + oddRe;
    im[p] = evenIm + oddIm;
    re[p + 1] = evenRe - oddRe;
    im[p + 1] = evenIm - oddIm;
    evenRe = a0Re + a4Re - (a2Re + a6Re);
    evenIm = a0Im + a4Im - (a2Im + a6Im);
    oddRe = a1Im + a5Im - (a3Im + a7Im);
    oddIm = a3Re + a7Re - (a1Re + a5Re);
    re[p + 2] = evenRe + oddRe;
    im[p + 2] = evenIm + oddIm;
    re[p + 3] = evenRe - oddRe;
    im[p + 3] = evenIm - oddIm;
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
    re[p + 4] = evenRe + oddRe;
    im[p + 4] = evenIm + oddIm;
    re[p + 5] = evenRe - oddRe;
    im[p + 5] = evenIm - oddIm;
    evenRe = a0Re - a4Re - (a2Im - a6Im);
    evenIm = a0Im - a4Im - (a6Re - a2Re);
    oddRe = b1Im - b3Im;
    oddIm = b3Re - b1Re;
    re[p + 6] = evenRe + oddRe;
    im[p + 6] = evenIm + oddIm;
    re[p + 7] = evenRe - oddRe;
    im[p + 7] = evenIm - oddIm;
  }
}

/** The way back of {@link forwardLastEight}, times `scale` (1/size of the transform) instead of 1/8. */
export function inverseFirstEight(re: Float64Array, im: Float64Array, scale: number): void {
  const size = re.length;
  for (let p = 0; p < size; p += 8) {
    const y0Re = scale * re[p];
    const y0Im = scale * im[p];
    const y1Re = scale * re[p + 1];
    const y1Im = scale * im[p + 1];
    const y2Re = scale * re[p + 2];
    const y2Im = scale * im[p + 2];
    const y3Re = scale * re[p + 3];
    const y3Im = scale * im[p + 3];
    const y4Re = scale * re[p + 4];
    const y4Im = scale * im[p + 4];
    const y5Re = scale * re[p + 5];
    const y5Im = scale * im[p + 5];
    const y6Re = scale * re[p + 6];
    const y6Im = scale * im[p + 6];
    const y7Re = scale * re[p + 7];
    const y7Im = scale * im[p + 7];
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
    re[p] = b0Re + b4Re;
    im[p] = b0Im + b4Im;
    re[p + 4] = b0Re - b4Re;
    im[p + 4] = b0Im - b4Im;
    re[p + 1] = b1Re + b5Re;
    im[p + 1] = b1Im + b5Im;
    re[p + 5] = b1Re - b5Re;
    im[p + 5] = b1Im - b5Im;
    re[p + 2] = b2Re + b6Re;
    im[p + 2] = b2Im + b6Im;
    re[p + 6] = b2Re - b6Re;
    im[p + 6] = b2Im - b6Im;
    re[p + 3] = b3Re + b7Re;
    im[p + 3] = b3Im + b7Im;
    re[p + 7] = b3Re - b7Re;
    im[p + 7] = b3Im - b7Im;
  }
}

import type { Generators } from './displacement';

/** Rotations of one elimination step: those of the plus columns, of the minus columns, and the hyperbolic one. */
interface Rotations {
  c: number;
  s: number;
  d: number;
  e: number;
  reflection: number;
  cosine: number;
  secant: number;
}

/**
 * The elimination of {@link invertBySchur} for one input and one edge, two steps in one pass over the four columns, which
 * halves the reading and writing of memory; the sums are those of `rotateFour`, in the same order.
 * @param tolerance share of the diagonal at or below which a pivot counts as zero
 * @returns how far each plus column has moved down, or the order at which it broke down
 */
export function eliminateByTwo(
  { size, plus, minus, diagonal }: Generators,
  tolerance: number,
): Int32Array | number {
  const [x, y] = plus;
  const [h, k] = minus;
  const least = tolerance * diagonal[0];
  // The first step is done: the minus columns begin with zero, and so does the second plus column.
  let shift = 1;
  x[size - 1] = 0;
  let i = 1;
  for (; i < size - 1; i += 2) {
    const first = rotationsFor(x[i - shift], y[i], h[i], k[i], least);
    if (first === null) return i;
    const kept = turn(first, x[i - shift], y[i], h[i], k[i]);
    const next = turn(first, x[i + 1 - shift], y[i + 1], h[i + 1], k[i + 1]);
    const second = rotationsFor(kept[0], next[1], next[2], next[3], least);
    if (second === null) return i + 1;
    // What leaves R at its end is lost: nothing is moved into the first row below it.
    turnTwice(first, second, x, -shift, y, h, k, i + 1, size, kept[0]);
    turnTwice(first, second, x, -shift, y, h, k, size, size + i + 2, 0);
    shift += 2;
    x[size - shift] = 0;
  }
  if (i < size) {
    const last = rotationsFor(x[i - shift], y[i], h[i], k[i], least);
    if (last === null) return i;
    for (let t = i; t < size + i + 1; t++) {
      [x[t - shift], y[t], h[t], k[t]] = turn(last, x[t - shift], y[t], h[t], k[t]);
    }
    shift++;
    x[size - shift] = 0;
  }
  return Int32Array.of(shift, 0);
}

function rotationsFor(x: number, y: number, h: number, k: number, least: number): Rotations | null {
  const plus = Math.sqrt(x * x + y * y);
  const minus = Math.sqrt(h * h + k * k);
  if (!((plus - minus) * (plus + minus) > least)) return null;
  const reflection = minus / plus;
  const cosine = Math.sqrt((1 - reflection) * (1 + reflection));
  return {
    c: x / plus,
    s: y / plus,
    d: minus > 0 ? h / minus : 1,
    e: minus > 0 ? k / minus : 0,
    reflection,
    cosine,
    secant: 1 / cosine,
  };
}

/** One row of a step. */
function turn(
  { c, s, d, e, reflection, cosine, secant }: Rotations,
  x: number,
  y: number,
  h: number,
  k: number,
): [number, number, number, number] {
  const turned = d * h + e * k;
  const kept = (c * x + s * y - reflection * turned) * secant;
  return [kept, c * y - s * x, cosine * turned - reflection * kept, d * k - e * h];
}

/**
 * Rows `from` to `to` of two steps; between them the first column moves down by a row.
 * @param dx row t of the first column stands at x[t + dx] before, and at x[t + dx - 1] afterwards
 * @param moved what moves into row `from`
 */
function turnTwice(
  first: Rotations,
  second: Rotations,
  x: Float64Array,
  dx: number,
  y: Float64Array,
  h: Float64Array,
  k: Float64Array,
  from: number,
  to: number,
  moved: number,
): void {
  const { c, s, d, e, reflection, cosine, secant } = first;
  const { c: c2, s: s2, d: d2, e: e2, reflection: reflection2, cosine: cosine2, secant: secant2 } = second;
  let above = moved;
  for (let t = from; t < to; t++) {
    const u = x[t + dx];
    const v = y[t];
    const w = h[t];
    const z = k[t];
    const turned = d * w + e * z;
    const kept = (c * u + s * v - reflection * turned) * secant;
    const v1 = c * v - s * u;
    const w1 = cosine * turned - reflection * kept;
    const z1 = d * z - e * w;
    const turned2 = d2 * w1 + e2 * z1;
    const kept2 = (c2 * above + s2 * v1 - reflection2 * turned2) * secant2;
    x[t + dx - 1] = kept2;
    y[t] = c2 * v1 - s2 * above;
    h[t] = cosine2 * turned2 - reflection2 * kept2;
    k[t] = d2 * z1 - e2 * w1;
    above = kept;
  }
}

import type { Turns } from './turns';

// Two steps in one pass over the rows of the generators, for one input and one edge: rows of five values, the pivot, its
// three partners and one that is zero. What is read once is turned twice, which takes half the time.

/**
 * @param before the pivot in the row before `from`
 * @param between the same after the first step
 */
export function sweepTwice(
  values: Float64Array,
  first: Turns,
  second: Turns,
  from: number,
  to: number,
  before: number,
  between: number,
): void {
  const s0 = first[0];
  const m0 = first[1];
  const s1 = first[2];
  const m1 = first[3];
  const s2 = first[4];
  const m2 = first[5];
  const u0 = second[0];
  const n0 = second[1];
  const u1 = second[2];
  const n1 = second[3];
  const u2 = second[4];
  const n2 = second[5];
  let came = before;
  let turned = between;
  for (let t = 5 * from; t < 5 * to; t += 5) {
    const x = came;
    came = values[t];
    const y0 = values[t + 1];
    const y1 = values[t + 2];
    const y2 = values[t + 3];
    const z0 = y0 - m0 * x;
    const x0 = x + s0 * y0;
    const x1 = x0 + s1 * y1;
    const z1 = y1 - m1 * x1;
    const x2 = x1 + s2 * y2;
    const z2 = y2 - m2 * x2;
    const w0 = turned + u0 * z0;
    values[t + 1] = z0 - n0 * turned;
    const w1 = w0 + u1 * z1;
    values[t + 2] = z1 - n1 * w1;
    const w2 = w1 + u2 * z2;
    values[t + 3] = z2 - n2 * w2;
    values[t] = w2;
    turned = x2;
  }
}

/**
 * The same for the first `count` rows of I, where the pivots u and v after the first and the second step are rows of the
 * factor's inverse: adds to the fit what they bring, `w ← w + weight u (uᵀ p)`.
 * @param unit first row of I
 * @param kept room for u
 */
export function sweepInverseTwice(
  values: Float64Array,
  first: Turns,
  second: Turns,
  unit: number,
  count: number,
  firstWeight: number,
  secondWeight: number,
  p: Float64Array,
  w: Float64Array,
  kept: Float64Array,
): void {
  const s0 = first[0];
  const m0 = first[1];
  const s1 = first[2];
  const m1 = first[3];
  const s2 = first[4];
  const m2 = first[5];
  const u0 = second[0];
  const n0 = second[1];
  const u1 = second[2];
  const n1 = second[3];
  const u2 = second[4];
  const n2 = second[5];
  let came = 0;
  let turned = 0;
  let up = 0;
  let vp = 0;
  for (let k = 0, t = 5 * unit; k < count; k++, t += 5) {
    const x = came;
    came = values[t];
    const y0 = values[t + 1];
    const y1 = values[t + 2];
    const y2 = values[t + 3];
    const z0 = y0 - m0 * x;
    const x0 = x + s0 * y0;
    const x1 = x0 + s1 * y1;
    const z1 = y1 - m1 * x1;
    const x2 = x1 + s2 * y2;
    const z2 = y2 - m2 * x2;
    const w0 = turned + u0 * z0;
    values[t + 1] = z0 - n0 * turned;
    const w1 = w0 + u1 * z1;
    values[t + 2] = z1 - n1 * w1;
    const w2 = w1 + u2 * z2;
    values[t + 3] = z2 - n2 * w2;
    values[t] = w2;
    turned = x2;
    kept[k] = x2;
    up += x2 * p[k];
    vp += w2 * p[k];
  }
  up *= firstWeight;
  vp *= secondWeight;
  for (let k = 0, t = 5 * unit; k < count; k++, t += 5) w[k] += up * kept[k] + vp * values[t];
}

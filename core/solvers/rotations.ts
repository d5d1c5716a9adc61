/**
 * Rotations of generator columns, written out so that each pass reads and writes every value once.
 * Row t of column x stands at x[t + dx]; `from` and `to` bound the rows that are not zero everywhere.
 */

/** Turns columns x and y in their plane so that y becomes zero in row `from`. Does nothing where it is zero already. */
export function rotate(
  x: Float64Array,
  dx: number,
  y: Float64Array,
  dy: number,
  from: number,
  to: number,
): void {
  const b = y[from + dy];
  if (b === 0) return;
  const a = x[from + dx];
  const length = Math.sqrt(a * a + b * b);
  if (!(length > 0)) return;
  const c = a / length;
  const s = b / length;
  for (let t = from; t < to; t++) {
    const u = x[t + dx];
    const v = y[t + dy];
    x[t + dx] = c * u + s * v;
    y[t + dy] = c * v - s * u;
  }
}

/**
 * Turns x against h hyperbolically (x² - h² is kept) so that h becomes zero in row `from`, in the mixed form: the new h
 * is made from the new x, which keeps the error as small as an orthogonal rotation's (Bojanczyk, Brent, Van Dooren &
 * de Hoog, *SIAM J. Matrix Anal. Appl.* 8, 1987, from memory).
 * @param least x² - h² in that row at or below which the reflection h/x counts as 1
 * @returns false, with nothing changed, where it does
 */
export function rotateHyperbolically(
  x: Float64Array,
  dx: number,
  h: Float64Array,
  from: number,
  to: number,
  least: number,
): boolean {
  const a = x[from + dx];
  const b = h[from];
  if (!((a - b) * (a + b) > least)) return false;
  const reflection = b / a;
  const cosine = Math.sqrt((1 - reflection) * (1 + reflection));
  const secant = 1 / cosine;
  for (let t = from; t < to; t++) {
    const kept = (x[t + dx] - reflection * h[t]) * secant;
    x[t + dx] = kept;
    h[t] = cosine * h[t] - reflection * kept;
  }
  return true;
}

/** `rotate(x, y)`, `rotate(h, k)` and `rotateHyperbolically(x, h)` in one pass; h and k are not displaced. */
export function rotateFour(
  x: Float64Array,
  dx: number,
  y: Float64Array,
  dy: number,
  h: Float64Array,
  k: Float64Array,
  from: number,
  to: number,
  least: number,
): boolean {
  const plus = Math.sqrt(x[from + dx] * x[from + dx] + y[from + dy] * y[from + dy]);
  const minus = Math.sqrt(h[from] * h[from] + k[from] * k[from]);
  if (!((plus - minus) * (plus + minus) > least)) return false;
  const c = x[from + dx] / plus;
  const s = y[from + dy] / plus;
  const d = minus > 0 ? h[from] / minus : 1;
  const e = minus > 0 ? k[from] / minus : 0;
  const reflection = minus / plus;
  const cosine = Math.sqrt((1 - reflection) * (1 + reflection));
  const secant = 1 / cosine;
  for (let t = from; t < to; t++) {
    const u = x[t + dx];
    const v = y[t + dy];
    const w = h[t];
    const z = k[t];
    const turned = d * w + e * z;
    const kept = (c * u + s * v - reflection * turned) * secant;
    x[t + dx] = kept;
    y[t + dy] = c * v - s * u;
    h[t] = cosine * turned - reflection * kept;
    k[t] = d * z - e * w;
  }
  return true;
}

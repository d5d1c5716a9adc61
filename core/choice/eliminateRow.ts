/** Columns of one sign. Row t of column j stands at `t - shifts[j]`. */
export interface Columns {
  rows: Float64Array[];
  shifts: Int32Array;
}

/** Columns of each sign that are turned in one pass; there must be at least as many. */
export const fused = 4;

/**
 * One step of the generalised Schur algorithm: turns the plus columns among themselves, the minus columns among
 * themselves (Householder's reflections) and then the pivot against the first minus column hyperbolically, in the mixed
 * form, so that in row `from` only the pivot is left. The error stays as small as with rotations (Chandrasekaran & Sayed,
 * *SIAM J. Matrix Anal. Appl.* 17, 1996, from memory). Five multiply-adds for each value of a column.
 * @param pivot plus columns before it are zero in this row; at least {@link fused} come from it on
 * @param to row from which on all columns are zero
 * @param least what the pivot's square must exceed
 * @returns false where it does not: the matrix is not positive definite
 */
export function eliminateRow(
  plus: Columns,
  minus: Columns,
  pivot: number,
  from: number,
  to: number,
  least: number,
): boolean {
  gather(plus, pivot, from, to);
  gather(minus, 0, from, to);
  const [p0, p1, p2, p3] = plus.rows.slice(pivot);
  const [h0, h1, h2, h3] = minus.rows;
  const [d0, d1, d2, d3] = plus.shifts.subarray(pivot);
  const u = reflection(p0[from - d0], p1[from - d1], p2[from - d2], p3[from - d3]);
  const v = reflection(h0[from], h1[from], h2[from], h3[from]);
  if (!((u.left - v.left) * (u.left + v.left) > least)) return false;
  // Both reflections leave minus the sign of what stood there.
  const ratio = (v.left / u.left) * u.sign * v.sign;
  const cosine = Math.sqrt((1 - ratio) * (1 + ratio));
  const secant = 1 / cosine;
  const { a: u0, b: u1, c: u2, d: u3, scale: us } = u;
  const { a: v0, b: v1, c: v2, d: v3, scale: vs } = v;
  for (let t = from; t < to; t++) {
    const x0 = p0[t - d0];
    const x1 = p1[t - d1];
    const x2 = p2[t - d2];
    const x3 = p3[t - d3];
    const y0 = h0[t];
    const y1 = h1[t];
    const y2 = h2[t];
    const y3 = h3[t];
    const s = us * (u0 * x0 + u1 * x1 + (u2 * x2 + u3 * x3));
    const q = vs * (v0 * y0 + v1 * y1 + (v2 * y2 + v3 * y3));
    const turned = y0 - v0 * q;
    const kept = (x0 - u0 * s - ratio * turned) * secant;
    p0[t - d0] = kept;
    p1[t - d1] = x1 - u1 * s;
    p2[t - d2] = x2 - u2 * s;
    p3[t - d3] = x3 - u3 * s;
    h0[t] = cosine * turned - ratio * kept;
    h1[t] = y1 - v1 * q;
    h2[t] = y2 - v2 * q;
    h3[t] = y3 - v3 * q;
  }
  return true;
}

/** `I - scale · (a, b, c, d)ᵀ(a, b, c, d)`, which leaves `-sign · left` in the first place and nothing in the others. */
function reflection(first: number, b: number, c: number, d: number) {
  const left = Math.sqrt(first * first + b * b + (c * c + d * d));
  const sign = first < 0 ? -1 : 1;
  const a = first + sign * left;
  const square = a * a + b * b + (c * c + d * d);
  return { left, sign, a, b, c, d, scale: square > 0 ? 2 / square : 0 };
}

/** Turns every column beyond the fused ones into the first, one after the other. */
function gather({ rows, shifts }: Columns, pivot: number, from: number, to: number): void {
  const x = rows[pivot];
  const dx = shifts[pivot];
  for (let j = pivot + fused; j < rows.length; j++) {
    const y = rows[j];
    const dy = shifts[j];
    const b = y[from - dy];
    if (b === 0) continue;
    const a = x[from - dx];
    const length = Math.sqrt(a * a + b * b);
    const c = a / length;
    const s = b / length;
    for (let t = from; t < to; t++) {
      const left = x[t - dx];
      const right = y[t - dy];
      x[t - dx] = c * left + s * right;
      y[t - dy] = c * right - s * left;
    }
  }
}

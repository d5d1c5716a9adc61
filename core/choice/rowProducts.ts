/**
 * Inner products of some rows with others over their first `count` values, two with four at a time, so that what is read
 * is used often.
 * @param into `[b][a]`: product of `rows[a]` and `others[b]`
 */
export function rowProducts(
  rows: readonly Float64Array[],
  others: readonly Float64Array[],
  count: number,
  into: readonly Float64Array[],
): void {
  for (let a = 0; a < rows.length; a += 2) {
    for (let b = 0; b < others.length; b += 4) eightProducts(rows, others, count, into, a, b);
  }
}

/** From rows a and b on; beyond the last stands the last, whose products come out the same again. */
function eightProducts(
  rows: readonly Float64Array[],
  others: readonly Float64Array[],
  count: number,
  into: readonly Float64Array[],
  a: number,
  b: number,
): void {
  const a1 = Math.min(a + 1, rows.length - 1);
  const b1 = Math.min(b + 1, others.length - 1);
  const b2 = Math.min(b + 2, others.length - 1);
  const b3 = Math.min(b + 3, others.length - 1);
  const u = rows[a];
  const v = rows[a1];
  const p = others[b];
  const q = others[b1];
  const r = others[b2];
  const s = others[b3];
  let up = 0;
  let uq = 0;
  let ur = 0;
  let us = 0;
  let vp = 0;
  let vq = 0;
  let vr = 0;
  let vs = 0;
  for (let k = 0; k < count; k++) {
    const x = u[k];
    const y = v[k];
    const pk = p[k];
    const qk = q[k];
    const rk = r[k];
    const sk = s[k];
    up += x * pk;
    uq += x * qk;
    ur += x * rk;
    us += x * sk;
    vp += y * pk;
    vq += y * qk;
    vr += y * rk;
    vs += y * sk;
  }
  into[b][a] = up;
  into[b1][a] = uq;
  into[b2][a] = ur;
  into[b3][a] = us;
  into[b][a1] = vp;
  into[b1][a1] = vq;
  into[b2][a1] = vr;
  into[b3][a1] = vs;
}

/** `aᵀb` over their first `count` values, in four sums, so that none waits for another. */
export function product(a: Float64Array, b: Float64Array, count: number): number {
  let first = 0;
  let second = 0;
  let third = 0;
  let fourth = 0;
  const fours = count - (count % 4);
  for (let k = 0; k < fours; k += 4) {
    first += a[k] * b[k];
    second += a[k + 1] * b[k + 1];
    third += a[k + 2] * b[k + 2];
    fourth += a[k + 3] * b[k + 3];
  }
  for (let k = fours; k < count; k++) first += a[k] * b[k];
  return first + second + (third + fourth);
}

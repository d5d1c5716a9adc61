/** Whole numbers are cut at this power of two, 2^16. */
export const limb = 65536;

/** The upper part of whole numbers, `floor(v / 2^16)`, and what is left, 0..65535. */
export function splitRows(rows: readonly Float64Array[]): [Float64Array[], Float64Array[]] {
  const high = rows.map((row) => row.map((v) => Math.floor(v / limb)));
  return [high, rows.map((row, r) => row.map((v, k) => v - limb * high[r][k]))];
}

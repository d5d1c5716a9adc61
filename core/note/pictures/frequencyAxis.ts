/** The unit in which an axis up to `highest` Hz is shown, and by what to divide. */
export function frequencyUnit(highest: number): { unit: string; divisor: number } {
  if (highest >= 1e7) return { unit: 'MHz', divisor: 1e6 };
  if (highest >= 1e4) return { unit: 'kHz', divisor: 1e3 };
  return { unit: 'Hz', divisor: 1 };
}

/**
 * The range of values in dB that a plot shows: down to `depth` below the highest, less where the lowest is above that.
 * Values that are not finite do not count.
 */
export function decibelRange(rows: readonly ArrayLike<number>[], depth: number): [number, number] {
  let lowest = Number.POSITIVE_INFINITY;
  let highest = Number.NEGATIVE_INFINITY;
  for (const row of rows) {
    for (let i = 0; i < row.length; i++) {
      if (!Number.isFinite(row[i])) continue;
      lowest = Math.min(lowest, row[i]);
      highest = Math.max(highest, row[i]);
    }
  }
  if (highest === Number.NEGATIVE_INFINITY) return [-10, 0];
  return [Math.max(lowest, highest - depth), highest];
}

/** Values below the range, minus infinity included, moved to its lower end. */
export function raised(values: Float64Array, lowest: number): Float64Array {
  return values.map((value) => Math.max(value, lowest));
}

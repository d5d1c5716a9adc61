/** A message is JSON, which has no infinity and no NaN. */
export function finiteOrNull(value: number | null | undefined): number | null {
  return value === null || value === undefined || !Number.isFinite(value) ? null : value;
}

/** The same for a figure in dB that must be shown: without any error at all it is below every limit. */
export function finiteDecibels(value: number): number {
  return Math.max(-999, Math.min(999, value));
}

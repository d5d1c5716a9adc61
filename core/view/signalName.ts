/** A channel's label within a sentence: a number by itself would read as one. */
export function signalName(label: string): string {
  return /^\d+$/.test(label) ? `channel ${label}` : label;
}

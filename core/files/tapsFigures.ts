/** Figures of a `NAME.taps.json` for a short account; null where the file does not state one. */
export interface TapsFigures {
  title: string | null;
  symbol: string | null;
  /** Reduction, dB. */
  attainableDb: number | null;
  quantisationLossDb: number | null;
  accumulator: number | null;
  macsPerSample: number | null;
  macsPerSecond: number | null;
  coefficientBytes: number | null;
  stateBytes: number | null;
}

/**
 * Picks the figures out of a taps file that `readTaps` has read: none of them is needed, so that whatever is not as
 * expected is left out.
 * @param text JSON
 */
export function tapsFigures(text: string): TapsFigures {
  const root: unknown = JSON.parse(text);
  const number = (...keys: string[]) => {
    const value = valueAt(root, keys);
    return typeof value === 'number' ? value : null;
  };
  const words = (...keys: string[]) => {
    const value = valueAt(root, keys);
    return typeof value === 'string' ? value : null;
  };
  return {
    title: words('title'),
    symbol: words('write', 'symbol'),
    attainableDb: number('heldOut', 'attainableDb'),
    quantisationLossDb: number('arithmetic', 'quantisationLossDb'),
    accumulator: number('arithmetic', 'accumulator'),
    macsPerSample: number('cost', 'macsPerSample'),
    macsPerSecond: number('cost', 'macsPerSecond'),
    coefficientBytes: number('cost', 'coefficientBytes'),
    stateBytes: number('cost', 'stateBytes'),
  };
}

function valueAt(value: unknown, keys: readonly string[]): unknown {
  let at = value;
  for (const key of keys) {
    if (typeof at !== 'object' || at === null || !Object.hasOwn(at, key)) return undefined;
    at = (at as Record<string, unknown>)[key];
  }
  return at;
}

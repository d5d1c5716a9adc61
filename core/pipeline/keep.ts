/**
 * Keeps the result of a stage while what it was made from stands: gives the kept one where the key is the same,
 * otherwise makes it. A stage that fails or is stopped keeps nothing.
 * @param stage its name; stages do not share results
 * @param key all that the result depends on, as JSON
 */
export type Keep = <T>(stage: string, key: unknown, make: () => Promise<T>) => Promise<T>;

/** For one pass over a document: nothing is asked for twice. */
export const keepNothing: Keep = (_stage, _key, make) => make();

/**
 * Keeps the last results of every stage, for work that is done again and again with small changes.
 * @param entries of a stage at most; stages that are named may have another number
 */
export function newKeep(entries: number, byStage: Readonly<Record<string, number>> = {}): Keep {
  const kept = new Map<string, Map<string, unknown>>();
  return async <T>(stage: string, key: unknown, make: () => Promise<T>) => {
    const text = JSON.stringify(key);
    const own = kept.get(stage) ?? new Map<string, unknown>();
    kept.set(stage, own);
    const result = own.has(text) ? (own.get(text) as T) : await make();
    // Newest last, so that the oldest goes first.
    own.delete(text);
    own.set(text, result);
    for (const oldest of own.keys()) {
      if (own.size <= (byStage[stage] ?? entries)) break;
      own.delete(oldest);
    }
    return result;
  };
}

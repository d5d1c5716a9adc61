import type { Change } from '../core/protocol/messages';
import type { Path } from './paths';

/**
 * An object of the document that needs several values at once, as fields show it: one that is filled in waits for the
 * others, and emptying all takes the object out.
 */
export interface Draft {
  [key: string]: number | null;
}

/** Changes for one key; empty while others that are needed are missing. */
export function pairedChange(
  path: Path,
  present: Draft | null,
  waiting: Draft,
  key: string,
  value: number | null,
  needed: readonly string[],
): { changes: Change[]; waiting: Draft } {
  if (present !== null) {
    if (value !== null) return { changes: [{ path: [...path, key], value }], waiting: {} };
    // Without one of its values the object means nothing.
    if (needed.includes(key)) return { changes: [{ path: [...path] }], waiting: {} };
    return { changes: [{ path: [...path, key] }], waiting: {} };
  }
  const next = { ...waiting, [key]: value };
  if (needed.some((name) => (next[name] ?? null) === null)) return { changes: [], waiting: next };
  const whole = Object.fromEntries(Object.entries(next).filter(([, one]) => one !== null));
  return { changes: [{ path: [...path], value: whole }], waiting: {} };
}

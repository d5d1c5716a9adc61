import type { At, Check } from '../checks/check';
import { type Keys, objectOf } from '../checks/keys';
import { listOf } from '../checks/lists';
import { numberIn, wholeIn } from '../checks/numbers';
import { trueOrFalse } from '../checks/texts';
import type { IntervalEntry } from '../pairingDocument';

/** Intervals of one kind in a take at most. */
const mostIntervals = 1000;

/** Wholes up to here are exact. */
const largest = Number.MAX_SAFE_INTEGER;

/** One interval or a list of at least `min`; whether they overlap or pass the end only the recordings tell. */
export function intervals(min: 0 | 1): Check<IntervalEntry[]> {
  const list = listOf(interval, min, mostIntervals);
  return (value, at) => {
    if (Array.isArray(value)) return list(value, at);
    const one = interval(value, at);
    return one === undefined ? undefined : [one];
  };
}

const interval: Check<IntervalEntry> = objectOf((keys: Keys) => {
  const samples = keys.optional('samples', trueOrFalse, false);
  const time = samples ? wholeIn(0, largest) : numberIn(0, largest);
  const from = keys.required('from', time);
  const to = keys.required('to', time);
  if (from === undefined || to === undefined) return undefined;
  return rising(from, to, samples ? 'samples' : 's', keys.at) ? { from, to, samples } : undefined;
});

/** True where `to` is after `from`; otherwise says how it is not. */
export function rising(from: number, to: number, unit: 'samples' | 's' | 'Hz', at: At): boolean {
  if (to === from) at.report('range-empty', { from, to, unit });
  if (to < from) at.report('range-reversed', { from, to, unit });
  return to > from;
}

import type { IntervalEntry } from '../core/document/pairingDocument';
import { type Interval, wholeSample } from '../core/pair/intervals';
import type { Change } from '../core/protocol/messages';
import type { FormView, TakeView } from '../core/protocol/views';
import { type Path, pathKey } from './paths';

export type IntervalKind = 'fit' | 'heldOut' | 'disturbanceOnly';

/** Which intervals of the document an edit is about. */
export interface IntervalList {
  take: number;
  kind: IntervalKind;
}

export interface IntervalRow extends IntervalEntry {
  /** Where the text has it; of a list that is left out, where it would stand. */
  path: Path;
}

/** What stands in the form: the document's own entries, or the resolved ones of a list that is left out. */
export function intervalRows(
  form: FormView,
  { take, kind }: IntervalList,
  resolved: TakeView | null,
  sampleRate: number | null,
): { rows: IntervalRow[]; leftOut: boolean } {
  const entries = form.document.takes[take]?.[kind] ?? null;
  const path: Path = ['takes', take, kind];
  const leftOut = entries === null || (entries.length === 0 && !isGiven(form, path));
  if (entries !== null) {
    const single = isGiven(form, [...path, 'from']);
    return { rows: entries.map((entry, i) => ({ ...entry, path: single ? path : [...path, i] })), leftOut };
  }
  const known = resolved?.[kind] ?? [];
  const rows = known.map((interval, i) => ({ ...entryOf(interval, sampleRate), path: [...path, i] }));
  return { rows, leftOut };
}

/** One end of one interval is typed, in the unit of its entry. */
export function setEnd(
  form: FormView,
  list: IntervalList,
  rows: readonly IntervalRow[],
  row: number,
  end: 'from' | 'to',
  value: number,
): Change[] {
  const path: Path = ['takes', list.take, list.kind];
  if (!isGiven(form, path)) {
    const changed = rows.map((entry, i) => written(i === row ? { ...entry, [end]: value } : entry));
    return [{ path: [...path], value: changed.length === 1 ? changed[0] : changed }];
  }
  return [{ path: [...rows[row].path, end], value }];
}

/** An interval was dragged: both ends in samples, of which those that moved are written. */
export function dragInterval(
  form: FormView,
  list: IntervalList,
  before: Interval,
  after: Interval,
  resolved: TakeView,
  sampleRate: number | null,
): Change[] {
  const { rows } = intervalRows(form, list, resolved, sampleRate);
  const row = rows.findIndex((entry) => {
    const { from, to } = samplesOf(entry, sampleRate);
    return from === before.from && to === before.to;
  });
  if (row < 0) return [];
  const given = isGiven(form, ['takes', list.take, list.kind]);
  if (!given) {
    const changed = rows.map((entry, i) => written(i === row ? entryOf(after, sampleRate) : entry));
    return [
      {
        path: ['takes', list.take, list.kind],
        value: changed.length === 1 ? changed[0] : changed,
      },
    ];
  }
  const inUnit = (samples: number) =>
    rows[row].samples || sampleRate === null ? samples : secondsOf(samples, sampleRate);
  const changes: Change[] = [];
  for (const end of ['from', 'to'] as const) {
    if (after[end] !== before[end])
      changes.push({ path: [...rows[row].path, end], value: inUnit(after[end]) });
  }
  return changes;
}

/** Adds an interval after those that are there; a single one becomes a list. */
export function addInterval(
  form: FormView,
  { take, kind }: IntervalList,
  rows: readonly IntervalRow[],
  added: IntervalEntry,
): Change[] {
  const path: Change['path'] = ['takes', take, kind];
  if (rows.length === 0) return [{ path, value: written(added) }];
  const isList = isGiven(form, [...path, 0]) || isGiven(form, [...path, 0, 'from']);
  if (isList) return [{ path: [...path, rows.length], value: written(added) }];
  return [{ path, value: [...rows, added].map(written) }];
}

/** Takes an interval out; the last one of a list takes the key with it, of held-out intervals it leaves an empty list. */
export function removeInterval(
  form: FormView,
  { take, kind }: IntervalList,
  rows: readonly IntervalRow[],
  row: number,
): Change[] {
  const path: Change['path'] = ['takes', take, kind];
  if (rows.length === 1) return kind === 'heldOut' ? [{ path, value: [] }] : [{ path }];
  if (isGiven(form, path)) return [{ path: [...path, row] }];
  return [{ path, value: rows.filter((_entry, i) => i !== row).map(written) }];
}

/** The shortest decimal number of seconds that means this sample. */
export function secondsOf(samples: number, sampleRate: number): number {
  const seconds = samples / sampleRate;
  for (let digits = 0; digits <= 15; digits++) {
    const short = Number(seconds.toFixed(digits));
    if (wholeSample(short, sampleRate) === samples) return short;
  }
  return seconds;
}

/** An entry in whole samples, as the design rounds it. */
export function samplesOf(entry: IntervalEntry, sampleRate: number | null): Interval {
  const scale = entry.samples || sampleRate === null ? 1 : sampleRate;
  return { from: wholeSample(entry.from, scale), to: wholeSample(entry.to, scale) };
}

function entryOf({ from, to }: Interval, sampleRate: number | null): IntervalEntry {
  if (sampleRate === null) return { from, to, samples: true };
  return { from: secondsOf(from, sampleRate), to: secondsOf(to, sampleRate), samples: false };
}

function written({ from, to, samples }: IntervalEntry): object {
  return samples ? { from, to, samples: true } : { from, to };
}

function isGiven(form: FormView, path: Path): boolean {
  const key = pathKey(path);
  return form.given.some((given) => given === key || given.startsWith(`${key}/`));
}

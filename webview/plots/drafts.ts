import type { Interval } from '../../core/pair/intervals';
import type { Kind } from './data';
import { type End, type Intervals, replaced, withEnd } from './intervalEnds';

interface Draft {
  kind: Kind;
  number: number;
  before: Interval;
  now: Interval;
}

/** Handed over; `expected` are the values that the document may still hold on its way there. */
interface Sent extends Draft {
  expected: Interval[];
}

/** Intervals as they are being dragged: the document's, with the one that is moved, or was handed over and is not back yet. */
export interface Drafts {
  /** The document's; a change that was handed over shows until they hold it, another value, or `forget`. */
  set(intervals: Intervals, samples: number): void;
  shown(): Intervals;
  /** Moves an end; hands back where it is. */
  move(end: End, sample: number): number;
  /** The end of a drag: what changed, or null where nothing did. */
  finish(): { kind: Kind; number: number; interval: Interval } | null;
  /** Gives a drag up. */
  cancel(): void;
  /** The document did not take what was handed over. */
  forget(): void;
  moving(): boolean;
}

const same = (a: Interval | undefined, b: Interval) => a !== undefined && a.from === b.from && a.to === b.to;

/** Nothing is held or handed over yet. */
export function newDrafts(): Drafts {
  let own: Intervals = { fit: [], heldOut: [], disturbanceOnly: [] };
  let samples = 0;
  let held: Draft | null = null;
  let sent: Sent | null = null;
  const apply = (to: Intervals, draft: Draft | null) =>
    draft === null ? to : replaced(to, draft.kind, draft.number, draft.now);
  const shown = () => apply(apply(own, sent), held);
  return {
    set(intervals, length) {
      own = intervals;
      samples = length;
      if (sent !== null) {
        const now = own[sent.kind][sent.number];
        if (!sent.expected.some((interval) => same(now, interval))) sent = null;
      }
      if (held !== null && own[held.kind][held.number] === undefined) held = null;
    },
    shown,
    move(end, sample) {
      const present = shown();
      const before = present[end.kind][end.number];
      if (held === null || held.kind !== end.kind || held.number !== end.number) {
        held = { kind: end.kind, number: end.number, before, now: before };
      }
      held.now = withEnd(present, end, sample, samples);
      return held.now[end.end];
    },
    finish() {
      const done = held;
      held = null;
      if (done === null || same(done.now, done.before)) return null;
      // A second change before the first is back: the document passes through the first.
      const again = sent !== null && sent.kind === done.kind && sent.number === done.number;
      sent = { ...done, expected: [...(again && sent !== null ? sent.expected : []), done.before] };
      return { kind: done.kind, number: done.number, interval: done.now };
    },
    cancel() {
      held = null;
    },
    forget() {
      sent = null;
    },
    moving: () => held !== null,
  };
}

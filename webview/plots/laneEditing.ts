import type { LanesData } from './data';
import { newDrafts } from './drafts';
import { type End, endAfterKey, endLimits, endsOf, type Intervals } from './intervalEnds';
import { newLaneEnds, type ShownEnd } from './laneEnds';
import type { LanesLayout } from './lanesLayout';
import { endLabel, placeWords } from './laneWords';
import { pixelOf, sampleAt, type View } from './sampleView';
import type { LanesOptions } from './types';

/** How long a handed-over interval waits for the document before the document's own shows again, milliseconds. */
const patience = 10_000;

/** What the lanes tell of themselves, and do for the intervals in them. */
export interface EditingPlace {
  area: HTMLElement;
  now(): { data: LanesData; view: View; layout: LanesLayout } | null;
  say(text: string): void;
  redraw(): void;
  /** Brings a sample into view. */
  reveal(sample: number): void;
}

/** The intervals of the take with what is being changed, and the handles of their ends. */
export interface LaneEditing {
  /** `other`: of another take, so that nothing under way belongs to it. */
  set(data: LanesData, other: boolean): void;
  shown(): Intervals;
  /** Puts the handles where the ends are now; none where intervals cannot be changed. */
  place(): void;
  dispose(): void;
}

/** Nothing is being changed yet. */
export function newLaneEditing(place: EditingPlace, onInterval: LanesOptions['onInterval']): LaneEditing {
  const drafts = newDrafts();
  let waiting = 0;
  const shownEnd = (end: End): ShownEnd | null => {
    const now = place.now();
    const intervals = drafts.shown();
    const sample = intervals[end.kind][end.number]?.[end.end];
    if (now === null || sample === undefined) return null;
    const { data, view, layout } = now;
    return {
      end,
      pixel: pixelOf(view, layout.across, sample),
      middle: layout.bars[end.kind] ?? 0,
      sample,
      limits: endLimits(intervals, end, data.take.samples),
      label: endLabel(end, intervals),
      valueText: placeWords(sample, data.sampleRate, perPixel(now)),
    };
  };
  const perPixel = ({ view, layout }: { view: View; layout: LanesLayout }) =>
    (view.to - view.from) / layout.across;
  const move = (end: End, sample: number) => {
    const reached = drafts.move(end, sample);
    const moved = shownEnd(end);
    if (moved !== null) place.say(`${moved.label}: ${moved.valueText}`);
    place.redraw();
    return reached;
  };
  const ends = newLaneEnds(place.area, {
    drag(end, pixel) {
      const now = place.now();
      if (now !== null) move(end, sampleAt(now.view, now.layout.across, pixel));
    },
    key(end, key, fast) {
      const now = place.now();
      const at = shownEnd(end);
      const next = now && at && endAfterKey(at.sample, key, fast, perPixel(now), at.limits);
      if (next === null) return false;
      place.reveal(move(end, next));
      return true;
    },
    finish() {
      const change = drafts.finish();
      if (change === null) return;
      onInterval?.(change.kind, change.number, change.interval);
      clearTimeout(waiting);
      waiting = window.setTimeout(() => {
        drafts.forget();
        place.redraw();
      }, patience);
    },
    cancel() {
      drafts.cancel();
      place.redraw();
    },
    reach(end) {
      const at = shownEnd(end);
      if (at !== null) place.reveal(at.sample);
    },
  });
  return {
    set({ take }, other) {
      if (other) {
        drafts.cancel();
        drafts.forget();
      }
      drafts.set(take, take.samples);
    },
    shown: drafts.shown,
    place() {
      const now = place.now();
      if (now === null || !onInterval) return;
      const shown = endsOf(drafts.shown()).map(shownEnd);
      ends.place(
        shown.filter((end) => end !== null),
        now.layout.left,
        now.layout.across,
      );
    },
    dispose: () => clearTimeout(waiting),
  };
}

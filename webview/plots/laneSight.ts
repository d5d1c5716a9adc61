import type { Interval } from '../../core/pair/intervals';
import type { LanesData } from './data';
import type { LaneSource } from './laneSource';
import type { LanesLayout } from './lanesLayout';
import { cursorWords, viewWords } from './laneWords';
import { panView, sampleAt, type View, viewAfterKey, viewHolding, zoomView } from './sampleView';

/** What is in view, where values are read, and what is said of both. */
export interface LaneSight {
  view(): View;
  cursor(): number | null;
  /** In whole samples, for what is kept. */
  whole(): Interval;
  /** Another take: everything in view, nothing read. */
  reset(samples: number): void;
  look(view: View, aloud: boolean): void;
  reveal(sample: number): void;
  /** Zooms around the cursor where it is in view, otherwise around the middle. */
  zoom(factor: number): void;
  zoomAt(factor: number, pixel: number): void;
  panPixels(pixels: number): void;
  key(key: string): boolean;
  moveCursor(pixels: number): void;
  placeCursor(pixel: number): void;
  clearCursor(): void;
  /** Says the values at the cursor again, where that is what was said last. */
  sayAgain(): void;
  say(text: string): void;
}

/**
 * @param now the lanes as they are; null while there are none
 * @param changed something is to be drawn again; `view`: what is in view changed too
 */
export function newLaneSight(
  now: () => { data: LanesData; layout: LanesLayout } | null,
  source: LaneSource,
  speak: (text: string) => void,
  changed: (what: 'view' | 'cursor') => void,
): LaneSight {
  let view: View = { from: 0, to: 1 };
  let cursor: number | null = null;
  /** The values at the cursor were said last, so that finer ones replace them. */
  let reading = false;
  const samples = () => now()?.data.take.samples ?? 0;
  const across = () => now()?.layout.across ?? 1;
  const perPixel = () => (view.to - view.from) / across();
  const middle = () =>
    cursor !== null && cursor >= view.from && cursor <= view.to ? cursor : (view.from + view.to) / 2;
  const say = (text: string) => {
    reading = false;
    speak(text);
  };
  const look = (next: View, aloud: boolean) => {
    const lanes = now();
    view = next;
    if (aloud && lanes !== null) say(viewWords(view, lanes.data, perPixel()));
    changed('view');
  };
  const reveal = (sample: number) => {
    const holding = viewHolding(sample, view, samples());
    if (holding !== view) look(holding, false);
  };
  const read = () => {
    const lanes = now();
    if (lanes === null || cursor === null) return;
    reading = true;
    speak(cursorWords(cursor, lanes.data, source));
  };
  const readAt = (sample: number) => {
    cursor = Math.min(samples() - 1, Math.max(0, Math.round(sample)));
    reveal(cursor);
    read();
    changed('cursor');
  };
  const zoom = (factor: number) => look(zoomView(view, factor, middle(), samples()), true);
  return {
    view: () => view,
    cursor: () => cursor,
    whole: () => ({ from: Math.floor(view.from), to: Math.min(samples(), Math.ceil(view.to)) }),
    reset(length) {
      view = { from: 0, to: length };
      cursor = null;
      say('');
    },
    look,
    reveal,
    zoom,
    zoomAt: (factor, pixel) => look(zoomView(view, factor, sampleAt(view, across(), pixel), samples()), true),
    panPixels: (pixels) => look(panView(view, pixels * perPixel(), samples()), true),
    key(key) {
      if (key === '+' || key === '=') zoom(0.5);
      else if (key === '-') zoom(2);
      else {
        const next = viewAfterKey(view, key, samples());
        if (next === null) return false;
        look(next, true);
      }
      return true;
    },
    moveCursor: (pixels) => readAt(middle() + pixels * Math.max(1, perPixel())),
    placeCursor: (pixel) => readAt(sampleAt(view, across(), pixel)),
    clearCursor() {
      cursor = null;
      say('');
      changed('cursor');
    },
    sayAgain() {
      if (reading) read();
    },
    say,
  };
}

import type { Interval } from '../../core/pair/intervals';
import { t } from '../words';
import { fitCanvas, oncePerFrame } from './canvasSize';
import { make } from './elements';
import { newFrame } from './frame';
import { kinds } from './intervalEnds';
import { newLaneEditing } from './laneEditing';
import { listenToLanes } from './laneInput';
import { newLaneSight } from './laneSight';
import { newLaneSource } from './laneSource';
import { type LanesLayout, lanesLayout } from './lanesLayout';
import { paintLanes } from './lanesPaint';
import { kindNames, laneTables } from './laneTables';
import { ledWords } from './laneWords';
import { fillLegend, type LegendEntry } from './legend';
import { clampView, type View, viewOf } from './sampleView';
import { barStrokes, strokesOf } from './strokes';
import { readPalette, watchTheme } from './theme';
import type { Lanes, LanesData, LanesOptions } from './types';

/** Waveforms one below the other on one time axis, with the intervals of the take as bars whose ends can be moved. */
export function newLanes({ title, envelope, onInterval, onView }: LanesOptions): Lanes {
  const keys = t(
    'Plus and minus zoom, arrow keys pan, Home and End lead to the ends, 0 shows all, Shift with left and right reads values.',
  );
  const picture = t('{0}: waveforms on one time axis. The table below has levels and intervals.', title);
  const frame = newFrame('plotLanes', title, keys, picture);
  const { area, canvas, element } = frame;
  const hint = t(
    'Click the waveforms, then the wheel zooms. Drag to pan, click to read values; + − 0 and arrow keys too.',
  );
  frame.readout.after(make('p', 'plotHint', hint));

  let data: LanesData | null = null;
  /** Wanted before there was anything to view. */
  let asked: View | null = null;
  let led: Interval | null = null;
  let palette = readPalette();
  let layout: LanesLayout = lanesLayout(0, 0, { fit: false, heldOut: false, disturbanceOnly: false });
  let told = 0;

  const source = newLaneSource(envelope, requestAnimationFrame.bind(window), (trouble) => {
    if (trouble !== null) sight.say(t('The waveforms could not be read: {0}', trouble));
    else sight.sayAgain();
    drawing.ask();
  });
  const now = () => (data === null ? null : { data, layout, view: sight.view() });
  const sight = newLaneSight(now, source, frame.say, (what) => {
    drawing.ask();
    if (what !== 'view' || !onView) return;
    clearTimeout(told);
    told = window.setTimeout(() => onView(sight.whole()), 150);
  });
  const draw = () => {
    if (data === null) return;
    const intervals = editing.shown();
    const has = { fit: false, heldOut: false, disturbanceOnly: false };
    for (const kind of kinds) has[kind] = intervals[kind].length > 0;
    layout = lanesLayout(area.clientWidth, data.lanes.length, has);
    area.style.height = `${layout.height}px`;
    const fitted = fitCanvas(canvas);
    if (fitted === null) return;
    const unit = data.sampleRate === null ? t('samples') : t('seconds');
    const seen = { view: sight.view(), cursor: sight.cursor(), led };
    paintLanes(fitted.ctx, { layout, data, source, intervals, names: kindNames(), unit, palette, ...seen });
    editing.place();
    source.need(sight.view(), layout.across * Math.min(2, window.devicePixelRatio || 1));
  };
  const drawing = oncePerFrame(draw);
  const { say, reveal } = sight;
  const editing = newLaneEditing({ area, now, say, redraw: drawing.ask, reveal }, onInterval);
  listenToLanes(area, canvas, () => layout.left, {
    ...sight,
    zoom: sight.zoomAt,
    escape() {
      led = null;
      sight.clearCursor();
    },
  });
  for (const [label, act] of [
    [t('Zoom in'), () => sight.zoom(0.5)],
    [t('Zoom out'), () => sight.zoom(2)],
    [t('All'), () => sight.key('0')],
  ] as const) {
    const button = make('button', 'plotButton', label);
    button.type = 'button';
    button.addEventListener('click', act);
    frame.tools.append(button);
  }

  const sizes = new ResizeObserver(drawing.ask);
  sizes.observe(area);
  const unwatch = watchTheme(() => {
    palette = readPalette();
    draw();
  });

  return {
    element,
    show(given) {
      const before = data;
      data = given !== null && given.take.samples > 0 ? given : null;
      const next = data;
      frame.fill(next === null ? null : () => laneTables(title, next, next.take));
      if (next === null) return source.start(null, false);
      const otherTake = before === null || !sameTake(before, next);
      const otherLanes = otherTake || lanesOf(before) !== lanesOf(next);
      if (otherLanes || before.stamp !== next.stamp) source.start(next, !otherLanes);
      editing.set(next, otherTake);
      if (otherTake) {
        led = null;
        sight.reset(next.take.samples);
      }
      if (asked !== null) sight.look(clampView(asked, next.take.samples), false);
      asked = null;
      fillLegend(frame.legend, legendOf(next));
      drawing.ask();
    },
    lead(span) {
      if (data === null) return;
      led = span;
      sight.look(viewOf(span, sight.view(), data.take.samples), false);
      sight.say(ledWords(span, data));
    },
    view: () => (data === null ? null : sight.whole()),
    setView(next) {
      if (data === null) asked = next;
      else sight.look(clampView(next, data.take.samples), false);
    },
    dispose() {
      drawing.cancel();
      clearTimeout(told);
      editing.dispose();
      source.start(null, false);
      sizes.disconnect();
      unwatch();
      element.remove();
    },
  };
}

function sameTake(a: LanesData, b: LanesData): boolean {
  return a.takeNumber === b.takeNumber && a.take.samples === b.take.samples;
}

function lanesOf({ lanes }: LanesData): string {
  return lanes.map(({ lane }) => lane).join('\n');
}

function legendOf({ lanes, take }: LanesData): LegendEntry[] {
  const strokes = strokesOf(lanes);
  const names = kindNames();
  const present = kinds.filter((kind) => take[kind].length > 0);
  return [
    ...lanes.map(({ label }, i) => ({ label, stroke: strokes[i] })),
    ...present.map((kind) => ({ label: names[kind], stroke: barStrokes[kind] })),
  ];
}

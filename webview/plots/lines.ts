import { t } from '../words';
import { type LineChart, newChart, refresh } from './chart';
import { curveTables, legendOf, readOut } from './curveWords';
import { newFrame } from './frame';
import { fillLegend } from './legend';
import { newCursor } from './marks/cursor';
import type { Drawn } from './marks/drawn';
import { newErrorBars } from './marks/errorBars';
import { newLevels } from './marks/levels';
import { newPlaces } from './marks/places';
import { newShades } from './marks/shades';
import { newSpans } from './marks/spans';
import { newStems } from './marks/stems';
import { nearestPoint, type Point, pointAfterKey } from './nearest';
import { horizontalRange, verticalRange } from './range';
import { axisTitle } from './shown';
import { strokeOf, strokesOf } from './strokes';
import { readPalette, watchTheme } from './theme';
import { keptPoints } from './thin';
import type { Plot, PlotData, PlotOptions } from './types';

const nothing: PlotData = { curves: [], marks: [] };

/** Curves over a common axis, with marks; a table, a legend in words and a cursor for keyboard and pointer. */
export function newPlot({ title, x, y, onPick }: PlotOptions): Plot {
  const keys = onPick
    ? t('Left and right move along the curve, up and down change the curve, Enter chooses.')
    : t('Left and right move along the curve, up and down change the curve.');
  const picture = t(
    '{0}: {1} against {2}. The table below has the numbers.',
    title,
    axisTitle(y),
    axisTitle(x),
  );
  const frame = newFrame('plotLines', title, keys, picture);
  const { area, canvas, element } = frame;
  if (onPick) area.classList.add('plotPickable');

  let data = nothing;
  let chart: LineChart | null = null;
  let columns = 0;
  const drawn: Drawn = {
    curves: [],
    marks: [],
    levelStroke: strokeOf('bound'),
    palette: readPalette(),
    yAxis: y,
    cursor: null,
  };
  const now = () => drawn;
  const plugins = [newSpans, newShades, newStems, newErrorBars, newLevels, newPlaces, newCursor].map(
    (plugin) => plugin(now),
  );
  let ranges = { x: { min: 0, max: 1 }, y: { min: 0, max: 1 } };

  const draw = () => {
    if (data === nothing) return;
    chart ??= newChart(canvas, plugins, resized);
    columns = Math.max(200, Math.ceil(canvas.clientWidth || 1200));
    const strokes = strokesOf(data.curves);
    drawn.curves = data.curves.map((curve, number) => ({
      curve,
      stroke: strokes[number],
      colour: drawn.palette.colour(strokes[number].variables),
      kept: keptPoints(curve.y.length, columnOf(curve.x), seriesOf(curve), columns),
    }));
    refresh(chart, drawn, x, y, ranges);
  };
  const columnOf = (values: ArrayLike<number>) => {
    const { min, max } = ranges.x;
    if (x.scale !== 'logarithmic') return (i: number) => ((values[i] - min) / (max - min)) * columns;
    const scale = columns / Math.log(max / min);
    return (i: number) => (values[i] > 0 ? Math.log(values[i] / min) * scale : Number.NaN);
  };
  // After the resize is done, and only where it changes what is worth keeping.
  const resized = () => {
    queueMicrotask(() => {
      if (chart !== null && Math.abs(canvas.clientWidth - columns) > 20) draw();
    });
  };

  const move = (cursor: Point | null) => {
    drawn.cursor = cursor;
    chart?.draw();
    frame.say(cursor === null ? '' : readOut(data, cursor, x, y));
  };
  const pointAt = (event: PointerEvent | MouseEvent): Point | null => {
    const scales = chart?.scales;
    if (!scales?.x) return null;
    const box = canvas.getBoundingClientRect();
    const pixelX = event.clientX - box.left;
    const pixelY = event.clientY - box.top;
    return nearestPoint(
      data.curves,
      { x: scales.x.getValueForPixel(pixelX) ?? 0, pixelX, pixelY },
      { x: (value) => scales.x.getPixelForValue(value), y: (value) => scales.y.getPixelForValue(value) },
    );
  };
  const pick = (point: Point | null) => {
    if (point !== null && onPick) onPick(data.curves[point.curve].x[point.index]);
  };

  area.addEventListener('keydown', (event) => {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    if (event.key === 'Enter' && onPick) pick(drawn.cursor);
    else if (event.key === 'Escape' && drawn.cursor !== null) move(null);
    else {
      const next = pointAfterKey(data.curves, drawn.cursor, event.key, event.shiftKey);
      if (next === null) return;
      move(next);
    }
    event.preventDefault();
  });
  let frameAsked = 0;
  area.addEventListener('pointermove', (event) => {
    cancelAnimationFrame(frameAsked);
    frameAsked = requestAnimationFrame(() => move(pointAt(event)));
  });
  area.addEventListener('pointerleave', () => {
    cancelAnimationFrame(frameAsked);
    if (document.activeElement !== area) move(null);
  });
  area.addEventListener('blur', () => move(null));
  area.addEventListener('click', (event) => {
    const point = pointAt(event);
    move(point);
    pick(point);
  });
  const unwatch = watchTheme(() => {
    drawn.palette = readPalette();
    draw();
  });

  return {
    element,
    show(given) {
      const next = given !== null && given.curves.length + given.marks.length > 0 ? given : null;
      data = next ?? nothing;
      drawn.marks = data.marks;
      const cursor = drawn.cursor;
      if (cursor !== null && !(cursor.index < (data.curves[cursor.curve]?.y.length ?? 0))) move(null);
      else if (cursor !== null) frame.say(readOut(data, cursor, x, y));
      ranges = { x: horizontalRange(data, x), y: verticalRange(data, y) };
      frame.fill(next === null ? null : () => curveTables(data, title, { x, y }));
      fillLegend(frame.legend, legendOf(data));
      draw();
    },
    dispose() {
      cancelAnimationFrame(frameAsked);
      unwatch();
      chart?.destroy();
      element.remove();
    },
  };
}

function seriesOf({ y, low, high }: PlotData['curves'][number]): ArrayLike<number>[] {
  return [y, ...(low ? [low] : []), ...(high ? [high] : [])];
}

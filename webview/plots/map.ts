import { t } from '../words';
import { fitCanvas, oncePerFrame } from './canvasSize';
import { newFrame } from './frame';
import { fillLegend } from './legend';
import { type Cell, cellAfterKey, cellAt, shadeRange } from './mapCells';
import { drawMap, mapBox } from './mapDraw';
import { mapScale } from './mapScale';
import { nearestIndex } from './nearest';
import type { Range } from './range';
import { axisTitle, shown, withUnit } from './shown';
import type { TableData } from './tableTwin';
import { readPalette, watchTheme } from './theme';
import { evenRows } from './thin';
import type { Axis, MapData, ShadeMap } from './types';

export interface ShadeMapOptions {
  title: string;
  x: Axis;
  y: Axis;
  /** What the values are, with their unit in brackets at the end: `Error (dB)`. */
  valueLabel: string;
  onPick?: (x: number, y: number) => void;
}

const mostColumns = 25;
const none: MapData = { x: [], y: [], values: [], marks: [] };

/** Values over two axes as shades, the lowest strongest; a cell can be read and chosen by keyboard and pointer. */
export function newShadeMap({ title, x, y, valueLabel, onPick }: ShadeMapOptions): ShadeMap {
  const [, label, unit] = /^(.*?)(?: \(([^)]*)\))?$/.exec(valueLabel) ?? ['', valueLabel, ''];
  const valueUnit = unit ?? '';
  const keys = onPick ? t('Arrow keys move, Enter chooses.') : t('Arrow keys move.');
  const picture = t(
    '{0}: {1} by {2} and {3}. The table below has the numbers.',
    title,
    valueLabel,
    axisTitle(x),
    axisTitle(y),
  );
  const frame = newFrame('plotMap', title, keys, picture);
  const { area, canvas, element } = frame;
  if (onPick) area.classList.add('plotPickable');
  let data = none;
  let range: Range | null = null;
  let cursor: Cell | null = null;
  let palette = readPalette();

  const draw = () => {
    const fitted = data.x.length > 0 ? fitCanvas(canvas) : null;
    if (fitted === null) return;
    drawMap(fitted.ctx, mapBox(fitted.width, fitted.height), data, range, { x, y }, cursor, palette);
  };
  const drawing = oncePerFrame(draw);
  const legend = () => {
    fillLegend(frame.legend, data.marks);
    if (range !== null) frame.legend.prepend(mapScale(range, label, valueUnit, palette));
  };
  const readOut = ({ ix, iy }: Cell) =>
    `${x.label} ${withUnit(data.x[ix], x.unit)}, ${y.label} ${withUnit(data.y[iy], y.unit)}: ${label} ${withUnit(data.values[iy * data.x.length + ix], valueUnit)}`;
  const move = (next: Cell | null) => {
    cursor = next;
    frame.say(next === null ? '' : readOut(next));
    drawing.ask();
  };
  const pick = (cell: Cell | null) => {
    if (cell !== null && onPick) onPick(data.x[cell.ix], data.y[cell.iy]);
  };
  const cellOf = (event: MouseEvent) => {
    const at = canvas.getBoundingClientRect();
    const box = mapBox(at.width, at.height);
    return cellAt(box, data.x.length, data.y.length, event.clientX - at.left, event.clientY - at.top);
  };
  /** The present choice, or the middle. */
  const start = (): Cell => {
    const mark = data.marks.find(({ shape }) => shape === 'now');
    if (mark === undefined) return { ix: data.x.length >> 1, iy: data.y.length >> 1 };
    return { ix: nearestIndex(data.x, mark.x), iy: nearestIndex(data.y, mark.y) };
  };

  area.addEventListener('keydown', (event) => {
    if (event.altKey || event.ctrlKey || event.metaKey || data.x.length === 0) return;
    if (event.key === 'Enter' && onPick) pick(cursor);
    else if (event.key === 'Escape' && cursor !== null) move(null);
    else {
      const next = cellAfterKey(cursor ?? start(), data.x.length, data.y.length, event.key, event.shiftKey);
      if (next === null) return;
      move(cursor === null ? start() : next);
    }
    event.preventDefault();
  });
  area.addEventListener('pointermove', (event) => move(cellOf(event)));
  area.addEventListener('pointerleave', () => {
    if (document.activeElement !== area) move(null);
  });
  area.addEventListener('blur', () => move(null));
  area.addEventListener('click', (event) => {
    const cell = cellOf(event);
    move(cell);
    pick(cell);
  });
  const sizes = new ResizeObserver(drawing.ask);
  sizes.observe(area);
  const unwatch = watchTheme(() => {
    palette = readPalette();
    legend();
    draw();
  });

  return {
    element,
    show(next) {
      data = next ?? none;
      range = shadeRange(data.values);
      if (cursor !== null && !(cursor.ix < data.x.length && cursor.iy < data.y.length)) move(null);
      else if (cursor !== null) frame.say(readOut(cursor));
      frame.fill(next === null ? null : () => [tableOf(next, { title, x, y, valueLabel }, valueUnit)]);
      legend();
      drawing.ask();
    },
    dispose() {
      drawing.cancel();
      sizes.disconnect();
      unwatch();
      element.remove();
    },
  };
}

/** A row for each value of the vertical axis; where there are more columns than can be read, evenly chosen ones. */
function tableOf({ x, y, values }: MapData, options: ShadeMapOptions, unit: string): TableData {
  const chosen = evenRows(x.length, mostColumns);
  const all = chosen.length === x.length;
  const caption = all
    ? `${options.title}: ${options.valueLabel}`
    : t(
        '{0}: {1}; {2} of {3} columns, evenly spaced',
        options.title,
        options.valueLabel,
        chosen.length,
        x.length,
      );
  const heads = chosen.map((ix) => ({
    label: `${options.x.label} ${withUnit(x[ix], options.x.unit)}`,
    show: (value: number) => shown(value, unit),
  }));
  return {
    caption,
    columns: [{ label: axisTitle(options.y), show: (value) => shown(value, options.y.unit) }, ...heads],
    rows: y.length,
    row: (iy) => [y[iy], ...chosen.map((ix) => values[iy * x.length + ix])],
  };
}

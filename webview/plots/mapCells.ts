import { nearestIndex } from './nearest';
import type { Range } from './range';

/** The part of a canvas that holds the cells. */
export interface Box {
  left: number;
  top: number;
  width: number;
  height: number;
}

/** A cell by its numbers along both axes. */
export interface Cell {
  ix: number;
  iy: number;
}

/**
 * Values between which shades differ: from the lowest to the value that nine in ten stay below, since a few very bad
 * ones would leave the rest one shade. Null where there are no values.
 */
export function shadeRange(values: ArrayLike<number>): Range | null {
  const finite = Array.from(values)
    .filter(Number.isFinite)
    .sort((a, b) => a - b);
  if (finite.length === 0) return null;
  const max = finite[Math.min(finite.length - 1, Math.ceil(0.9 * finite.length))];
  return { min: finite[0], max: max > finite[0] ? max : finite[0] + 1 };
}

/** 1 for the lowest (best) value, 0 for the highest and beyond. */
export function shadeOf(value: number, { min, max }: Range): number {
  return Math.min(1, Math.max(0, (max - value) / (max - min)));
}

/** The cell under a pixel, the lowest row at the bottom; null outside. */
export function cellAt(box: Box, columns: number, rows: number, pixelX: number, pixelY: number): Cell | null {
  const ix = Math.floor(((pixelX - box.left) / box.width) * columns);
  const iy = rows - 1 - Math.floor(((pixelY - box.top) / box.height) * rows);
  return ix >= 0 && ix < columns && iy >= 0 && iy < rows ? { ix, iy } : null;
}

/** The pixels of a cell, edges on whole pixels so that cells meet without seams. */
export function cellBox(box: Box, columns: number, rows: number, { ix, iy }: Cell): Box {
  const edge = (start: number, size: number, count: number, number: number) =>
    Math.round(start + (size * number) / count);
  const left = edge(box.left, box.width, columns, ix);
  const top = edge(box.top, box.height, rows, rows - 1 - iy);
  return {
    left,
    top,
    width: edge(box.left, box.width, columns, ix + 1) - left,
    height: edge(box.top, box.height, rows, rows - iy) - top,
  };
}

/** The cell where a place of both axes is, fractions of a cell included so that a mark between two stands between them. */
export function placeIn(rising: number[], value: number): number {
  const near = nearestIndex(rising, value);
  const other = value < rising[near] ? near - 1 : near + 1;
  if (value === rising[near] || other < 0 || other >= rising.length) return Math.max(0, near);
  return near + ((value - rising[near]) / (rising[other] - rising[near])) * (other - near);
}

/** Where a key leads from a cell; null where it is none of ours. */
export function cellAfterKey(
  from: Cell,
  columns: number,
  rows: number,
  key: string,
  fast: boolean,
): Cell | null {
  const step = fast ? 5 : 1;
  const moves: Record<string, [number, number]> = {
    ArrowRight: [step, 0],
    ArrowLeft: [-step, 0],
    ArrowUp: [0, step],
    ArrowDown: [0, -step],
    Home: [-columns, 0],
    End: [columns, 0],
    PageUp: [0, rows],
    PageDown: [0, -rows],
  };
  const move = moves[key];
  if (move === undefined) return null;
  return {
    ix: Math.min(columns - 1, Math.max(0, from.ix + move[0])),
    iy: Math.min(rows - 1, Math.max(0, from.iy + move[1])),
  };
}

/** Numbers of the values that get a label: evenly spaced, at most `most`. */
export function labelled(count: number, most: number): number[] {
  const every = Math.max(1, Math.ceil(count / Math.max(1, most)));
  return Array.from({ length: Math.ceil(count / every) }, (_, i) => i * every);
}

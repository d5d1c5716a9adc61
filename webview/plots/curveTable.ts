import type { Axis, Curve, Mark } from './data';
import { axisTitle, shown } from './shown';

/** Rows of the numbers of several curves: one row for each x that any of them has. */
export interface CurveRows {
  x: ArrayLike<number>;
  /** For each curve the number of its point in a row; -1: none. */
  index(curve: number, row: number): number;
}

/** Joins curves on their x; those that share it need no search. */
export function joinRows(curves: Curve[]): CurveRows {
  const first = curves[0]?.x ?? [];
  if (curves.every(({ x }) => x === first || same(x, first)))
    return { x: first, index: (_curve, row) => row };
  const places = curves.map(({ x }) => new Map(Array.from(x, (value, i) => [value, i])));
  const all = [...new Set(places.flatMap((place) => [...place.keys()]))].sort((a, b) => a - b);
  return { x: all, index: (curve, row) => places[curve].get(all[row]) ?? -1 };
}

function same(a: ArrayLike<number>, b: ArrayLike<number>): boolean {
  if (a.length !== b.length) return false;
  for (let i = 0; i < a.length; i++) if (a[i] !== b[i]) return false;
  return true;
}

/** What a cell shows: a label and the value at a point. */
export interface CurveColumn {
  label: string;
  value(row: number): number;
}

/** Columns of a table of curves: x, each curve's y, its error and the ends of its interval where it has them. */
export function curveColumns(
  curves: Curve[],
  x: Axis,
  y: Axis,
  words: { error(label: string): string; from(label: string): string; to(label: string): string },
): { rows: number; columns: (CurveColumn & { show(value: number): string })[] } {
  const rows = joinRows(curves);
  const column = (label: string, curve: number, values: ArrayLike<number>) => ({
    label,
    show: (value: number) => shown(value, y.unit),
    value(row: number) {
      const index = rows.index(curve, row);
      return index < 0 ? Number.NaN : values[index];
    },
  });
  const columns = curves.flatMap((curve, number) => {
    const label = axisTitle({ label: curve.label, unit: y.unit });
    const own = [column(label, number, curve.y)];
    if (curve.errors) own.push(column(words.error(label), number, curve.errors));
    if (curve.low) own.push(column(words.from(label), number, curve.low));
    if (curve.high) own.push(column(words.to(label), number, curve.high));
    return own;
  });
  const places = {
    label: axisTitle(x),
    show: (value: number) => shown(value, x.unit),
    value: (row: number) => rows.x[row],
  };
  return { rows: rows.x.length, columns: [places, ...columns] };
}

/** Marks as rows of label, place or stretch, and value. */
export function markRows(marks: Mark[], x: Axis, y: Axis): [string, string, string][] {
  return marks.map((mark) => {
    if (mark.kind === 'level') return [mark.label, '', shown(mark.y, y.unit)];
    if (mark.kind === 'place') return [mark.label, shown(mark.x, x.unit), shown(mark.y, y.unit)];
    return [mark.label, `${shown(mark.from, x.unit)} – ${shown(mark.to, x.unit)}`, ''];
  });
}

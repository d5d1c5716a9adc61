import { t } from '../words';
import { curveColumns, markRows } from './curveTable';
import type { Axis, PlotData } from './data';
import { type LegendEntry, markEntries } from './legend';
import type { Point } from './nearest';
import { axisTitle, shown, withUnit } from './shown';
import { strokeOf, strokesOf } from './strokes';
import type { TableData } from './tableTwin';

/** Curves by their strokes, then the marks. */
export function legendOf({ curves, marks }: PlotData): LegendEntry[] {
  const strokes = strokesOf(curves);
  const lines = curves.map(({ label, style }, i) => ({
    label,
    stroke: strokes[i],
    points: style === 'points' || style === 'stems',
  }));
  return [...lines, ...markEntries(marks, strokeOf('bound'))];
}

/** What is said of a point: its curve's value first, then those of others at the same place. */
export function readOut({ curves }: PlotData, { curve, index }: Point, x: Axis, y: Axis): string {
  const place = curves[curve].x[index];
  const order = [curve, ...curves.keys()].filter((number, i, all) => all.indexOf(number) === i);
  const values = order.slice(0, 4).flatMap((number) => {
    const other = curves[number];
    if (other.x[index] !== place) return [];
    const error = other.errors ? ` ± ${shown(other.errors[index], y.unit)}` : '';
    return [`${other.label} ${withUnit(other.y[index], y.unit, error)}`];
  });
  return `${x.label} ${withUnit(place, x.unit)}: ${values.join('; ')}`;
}

/** The numbers of the curves, and the marks where there are any. */
export function curveTables(data: PlotData, title: string, { x, y }: { x: Axis; y: Axis }): TableData[] {
  const { rows, columns } = curveColumns(data.curves, x, y, {
    error: (label) => t('± of {0}', label),
    from: (label) => t('{0} from', label),
    to: (label) => t('{0} to', label),
  });
  const made: TableData[] = [
    { caption: title, columns, rows, row: (index) => columns.map(({ value }) => value(index)) },
  ];
  if (data.marks.length > 0) {
    const marks = markRows(data.marks, x, y);
    const text = (label: string) => ({ label, show: String });
    made.push({
      caption: t('{0}: marks', title),
      columns: [text(t('Mark')), text(axisTitle(x)), text(axisTitle(y))],
      rows: marks.length,
      row: (index) => marks[index],
    });
  }
  return made;
}

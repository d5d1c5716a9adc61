import { significant } from '../../figures/numbers';
import type { ChoiceLine } from '../../pipeline/choiceLines';
import type { DesignResult } from '../../pipeline/designResult';
import { curvePath, legend, strokeOf } from './curves';
import { axes, newPlot, type Plot, type Tick } from './plot';
import { coordinate, faintInk, ink, svgFile } from './svg';

const plotHeight = 130;
const heading = 26;
const axisHeight = 48;

/** Values whose labels fit beside each other. */
const mostLabels = 12;

/** Errors that far above the least are cut off, so that the others can be told apart. */
const depth = 40;

/** Errors along length, delay and regularisation through the document's filter; null where there are none. */
export function choicePicture({ choice, inspection, document }: DesignResult, mark: string): string | null {
  if (choice === null || 'withheld' in choice) return null;
  // Of all frequencies alike.
  const attainableDb = document.prepare.band === null ? (inspection?.attainable.attainableDb ?? null) : null;
  const labels = ['cross-validated, with its standard error', 'fit'];
  if (attainableDb !== null) labels.push('attainable, from the coherence');
  const key = legend(labels, 36);
  const panels = [
    { line: choice.length, title: 'length in taps' },
    ...(choice.delay.values.length > 1 ? [{ line: choice.delay, title: 'delay in samples' }] : []),
    { line: choice.regularisation, title: 'regularisation, of the input power' },
  ];
  const panelHeight = heading + plotHeight + axisHeight;
  const limit = attainableDb === null ? null : -attainableDb;
  return svgFile({
    mark,
    title: 'Error against length, delay and regularisation',
    description: `Cross-validated error and fit error in dB inside the fit intervals, in each plot the other two as in the document, whose own value has the upright line: ${panels.map(({ title }) => title).join('; ')}.`,
    height: key.bottom + panels.length * panelHeight + 8,
    body: [
      ...key.body,
      ...panels.flatMap(({ line, title }, i) =>
        panel(line, title, limit, key.bottom + i * panelHeight + heading),
      ),
    ],
  });
}

function panel(line: ChoiceLine, title: string, limit: number | null, top: number): string[] {
  const { values, own, crossDb, fitDb } = line;
  const last = values.length - 1;
  const plot = newPlot(top, plotHeight, [-0.5, last + 0.5], range(line, limit));
  const x = values.map((_, i) => i);
  const inside = (row: Float64Array) => row.map((value) => Math.min(value, plot.y.domain()[1]));
  const at = coordinate(plot.x(own));
  return [
    ...axes(plot, title, 'NMSE in dB', ticksOf(values)),
    `<path d="M${at},${plot.top}V${plot.bottom}" stroke="${faintInk}" stroke-dasharray="3 3"/>`,
    `<text x="${at}" y="${plot.top - 5}" text-anchor="middle" fill="${ink}">${significant(values[own])}</text>`,
    ...errorBars(plot, line),
    curvePath(plot, { x, y: inside(crossDb) }, 0),
    ...x
      .filter((i) => Number.isFinite(crossDb[i]) && crossDb[i] <= plot.y.domain()[1])
      .map((i) => dot(plot, i, crossDb[i])),
    curvePath(plot, { x, y: inside(fitDb) }, 1),
    ...(limit === null ? [] : [curvePath(plot, { x: [-0.5, last + 0.5], y: [limit, limit] }, 2)]),
  ];
}

function dot(plot: Plot, x: number, y: number): string {
  return `<path d="M${coordinate(plot.x(x))},${coordinate(plot.y(y))}h0" stroke-width="5" stroke-linecap="round" ${strokeOf(0)}/>`;
}

/** From the least to the largest error, the limit among them, {@link depth} at most. */
function range({ crossDb, fitDb }: ChoiceLine, limit: number | null): [number, number] {
  const all = [...crossDb, ...fitDb, ...(limit === null ? [] : [limit])].filter(Number.isFinite);
  if (all.length === 0) return [-1, 0];
  const low = Math.min(...all);
  return [low, Math.min(low + depth, Math.max(...all))];
}

function ticksOf(values: readonly number[]): Tick[] {
  const every = Math.ceil(values.length / mostLabels);
  return values.flatMap((value, at) => (at % every === 0 ? [{ at, label: significant(value, 2) }] : []));
}

function errorBars(plot: Plot, { crossDb, errorDb }: ChoiceLine): string[] {
  const [low, high] = plot.y.domain();
  const y = (value: number) => coordinate(plot.y(Math.min(high, Math.max(low, value))));
  const bars = Array.from(crossDb, (value, i) =>
    Number.isFinite(value) && Number.isFinite(errorDb[i])
      ? `M${coordinate(plot.x(i))},${y(value - errorDb[i])}V${y(value + errorDb[i])}`
      : '',
  ).join('');
  return bars === ''
    ? []
    : [`<path d="${bars}" fill="none" stroke="${faintInk}" stroke-opacity="0.5" stroke-width="4"/>`];
}

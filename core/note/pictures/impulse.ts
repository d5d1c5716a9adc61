import { normal95 } from '../../confidence/tapErrors';
import { duration } from '../../figures/units';
import type { DesignResult } from '../../pipeline/designResult';
import { curvePath, strokeOf } from './curves';
import { axes, newPlot, type Plot } from './plot';
import { coordinate, faintInk, ink, shortened, svgFile, xmlText } from './svg';

const top = 40;
/** Heading, plot and axis of one input. */
const heading = 24;
const plotHeight = 150;
const axisHeight = 52;
const panelHeight = heading + plotHeight + axisHeight;

/** As many taps are drawn one by one; more as a line. */
const stemsUpTo = 160;

/** The impulse response: the coefficients of each input over their delay. */
export function impulsePicture(result: DesignResult, mark: string): string {
  const { coefficients, inputs, sampleRate } = result;
  return svgFile({
    mark,
    title: 'Impulse response',
    description: `Coefficients over their delay k, 0 to ${coefficients[0].length - 1} samples of ${duration(1 / sampleRate)}, one plot for each input: ${inputs.join(', ')}${'withheld' in result.confidence.errors || coefficients[0].length > stemsUpTo ? '' : '; grey bars reach over 95 % of their errors'}.`,
    height: top + coefficients.length * panelHeight,
    body: coefficients.flatMap((row, r) => panel(result, row, r)),
  });
}

function panel(result: DesignResult, row: Float64Array, r: number): string[] {
  const { inputs, sampleRate } = result;
  const start = top + r * panelHeight;
  const low = row.reduce((m, v) => Math.min(m, v), 0);
  const high = row.reduce((m, v) => Math.max(m, v), 0);
  const plot = newPlot(start + heading, plotHeight, [-0.5, row.length - 0.5], [low, high]);
  return [
    `<text x="16" y="${start + 14}" fill="${ink}">input ${xmlText(shortened(inputs[r], 80))}</text>`,
    ...axes(
      plot,
      `delay k in samples of ${duration(1 / sampleRate)}`,
      'w (d unit / x unit)',
      Math.min(8, row.length),
    ),
    `<path d="M${plot.left},${coordinate(plot.y(0))}H${plot.right}" stroke="${ink}"/>`,
    ...errorBars(result, plot, row, r),
    row.length <= stemsUpTo ? stems(plot, row) : curvePath(plot, { x: row.map((_, k) => k), y: row }, 0),
  ];
}

/** A bar of 95 % around each tap, where errors are known and the taps are drawn one by one. */
function errorBars(
  { confidence: { errors } }: DesignResult,
  plot: Plot,
  row: Float64Array,
  r: number,
): string[] {
  const own = 'withheld' in errors ? undefined : errors.standardErrors[r];
  if (own === undefined || row.length > stemsUpTo) return [];
  const [low, high] = plot.y.domain();
  const at = (value: number) => coordinate(plot.y(Math.min(high, Math.max(low, value))));
  const bars = Array.from(row, (w, k) => {
    const reach = normal95 * (own[k] ?? 0);
    return `M${coordinate(plot.x(k))},${at(w - reach)}V${at(w + reach)}`;
  });
  return [
    `<path d="${bars.join('')}" fill="none" stroke="${faintInk}" stroke-opacity="0.5" stroke-width="4"/>`,
  ];
}

function stems(plot: Plot, row: Float64Array): string {
  const zero = coordinate(plot.y(0));
  const at = Array.from(row, (w, k) => ({ x: coordinate(plot.x(k)), y: coordinate(plot.y(w)) }));
  const lines = at.map(({ x, y }) => `M${x},${zero}V${y}`).join('');
  const dots = at.map(({ x, y }) => `M${x},${y}h0`).join('');
  return `<path d="${lines}" fill="none" stroke-width="1.5" ${strokeOf(0)}/>\n<path d="${dots}" fill="none" stroke-width="5" stroke-linecap="round" ${strokeOf(0)}/>`;
}

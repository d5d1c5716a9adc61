import {
  Chart,
  type ChartConfiguration,
  LinearScale,
  LineController,
  LineElement,
  LogarithmicScale,
  type Plugin,
  PointElement,
  type ScaleOptions,
} from 'chart.js';
import type { Axis } from './data';
import type { Drawn } from './marks/drawn';
import type { Range } from './range';
import { axisTitle, shown } from './shown';
import { strokeWidth } from './strokes';
import { linearTicks, logarithmicTicks, tickText } from './ticks';

Chart.register(LineController, LineElement, PointElement, LinearScale, LogarithmicScale);

export type LineChart = Chart<'line', { x: number; y: number }[]>;

/** An empty chart on a canvas, with plugins of our own. It handles no events: the plot around it does. */
export function newChart(
  canvas: HTMLCanvasElement,
  plugins: Plugin<'line'>[],
  resized: () => void,
): LineChart {
  const config: ChartConfiguration<'line', { x: number; y: number }[]> = {
    type: 'line',
    data: { datasets: [] },
    plugins,
    options: {
      parsing: false,
      animation: false,
      normalized: true,
      responsive: true,
      maintainAspectRatio: false,
      events: [],
      onResize: resized,
      layout: { padding: { top: 8, right: 12 } },
    },
  };
  return new Chart(canvas, config);
}

/** Puts what is drawn into the chart and draws it. */
export function refresh(
  chart: LineChart,
  drawn: Drawn,
  x: Axis,
  y: Axis,
  ranges: { x: Range; y: Range },
): void {
  const { palette } = drawn;
  chart.data.datasets = drawn.curves.map(({ curve, stroke, colour, kept }) => {
    const style = curve.style ?? 'line';
    const room = chart.width / Math.max(1, kept.length);
    const radius = style === 'line' ? 0 : Math.min(3, Math.max(1, room / 3));
    return {
      data: kept.map((i) => ({ x: curve.x[i], y: Number.isFinite(curve.y[i]) ? curve.y[i] : Number.NaN })),
      showLine: style === 'line',
      borderColor: colour,
      borderWidth: strokeWidth(stroke, palette.highContrast),
      borderDash: stroke.dash,
      borderJoinStyle: 'round' as const,
      backgroundColor: colour,
      pointRadius: radius,
      pointBorderWidth: 0,
      pointHoverRadius: radius,
      spanGaps: false,
      tension: 0,
    };
  });
  chart.options.scales = { x: scale(x, 'x', ranges.x, drawn), y: scale(y, 'y', ranges.y, drawn) };
  chart.options.font = { family: palette.fontFamily, size: palette.fontSize };
  chart.update('none');
}

function scale(
  axis: Axis,
  direction: 'x' | 'y',
  range: Range,
  { palette }: Drawn,
): ScaleOptions<'linear' | 'logarithmic'> {
  const logarithmic = axis.scale === 'logarithmic';
  const common = {
    axis: direction,
    min: range.min,
    max: range.max,
    border: { color: palette.frame },
    grid: { color: palette.grid, tickColor: palette.frame, tickLength: 4 },
    title: {
      display: true,
      text: axisTitle(axis),
      color: palette.muted,
      font: { family: palette.fontFamily, size: palette.fontSize },
      padding: 2,
    },
  };
  const ticks = { color: palette.muted, maxRotation: 0, autoSkipPadding: 8, font: common.title.font };
  let step = 1;
  /** Ticks of our own choosing, as many as the axis has room for. */
  const afterBuildTicks = (built: {
    width: number;
    height: number;
    maxWidth: number;
    maxHeight: number;
    ticks: { value: number }[];
  }) => {
    const length = direction === 'x' ? built.width || built.maxWidth : built.height || built.maxHeight;
    const count = Math.max(2, Math.floor(length / (direction === 'x' ? 62 : 32)));
    const linear = linearTicks(range.min, range.max, count);
    step = linear.step;
    built.ticks = (logarithmic ? logarithmicTicks(range.min, range.max, count) : linear.values).map(
      (value) => ({ value }),
    );
  };
  const callback = (value: string | number) =>
    logarithmic ? shown(Number(value), '') : tickText(Number(value), step);
  return {
    ...common,
    type: logarithmic ? 'logarithmic' : 'linear',
    afterBuildTicks,
    ticks: { ...ticks, callback },
  };
}

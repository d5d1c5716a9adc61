import type { Chart } from 'chart.js';
import type { Axis, Curve, Mark } from '../data';
import type { Point } from '../nearest';
import type { Stroke } from '../strokes';
import type { Palette } from '../theme';

/** What the plugins of a plot draw; read anew at each drawing. */
export interface Drawn {
  curves: {
    curve: Curve;
    stroke: Stroke;
    colour: string;
    /** Points that the screen can show. */
    kept: number[];
  }[];
  marks: Mark[];
  levelStroke: Stroke;
  palette: Palette;
  yAxis: Axis;
  cursor: Point | null;
}

/** Draws inside the chart's area with the canvas's state kept. */
export function inside(chart: Chart, clipped: boolean, draw: (ctx: CanvasRenderingContext2D) => void): void {
  const { ctx, chartArea, scales } = chart;
  // A new chart draws once before it has axes.
  if (scales.x === undefined || scales.y === undefined) return;
  ctx.save();
  if (clipped) {
    ctx.beginPath();
    ctx.rect(chartArea.left, chartArea.top, chartArea.width, chartArea.height);
    ctx.clip();
  }
  draw(ctx);
  ctx.restore();
}

/** Pixels of a point of the chart. */
export function pixels(chart: Chart): { x(value: number): number; y(value: number): number } {
  const { x, y } = chart.scales;
  return { x: (value) => x.getPixelForValue(value), y: (value) => y.getPixelForValue(value) };
}

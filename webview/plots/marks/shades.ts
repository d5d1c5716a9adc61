import type { Plugin } from 'chart.js';
import { fade } from '../colours';
import { type Drawn, inside, pixels } from './drawn';

/** Shaded intervals around curves, and the filling under those that stand for an error. */
export function newShades(drawn: () => Drawn): Plugin<'line'> {
  return {
    id: 'shades',
    beforeDatasetsDraw(chart) {
      inside(chart, true, (ctx) => {
        const { curves, palette, yAxis } = drawn();
        const at = pixels(chart);
        const { top, bottom } = chart.chartArea;
        const limited = (pixel: number) => Math.min(bottom + 4, Math.max(top - 4, pixel));
        // Decibels and logarithms have no natural zero: those are filled from the bottom.
        const fromBottom = yAxis.scale === 'logarithmic' || yAxis.unit.startsWith('dB');
        const base = fromBottom ? bottom : limited(at.y(0));
        for (const { curve, stroke, colour, kept } of curves) {
          const { low, high } = curve;
          if (low && high) {
            ctx.fillStyle = fade(colour, palette.highContrast ? 0.35 : 0.2);
            for (const run of runs(kept, (i) => !Number.isNaN(low[i]) && !Number.isNaN(high[i]))) {
              const edge = (value: number) =>
                value === Number.NEGATIVE_INFINITY ? bottom + 4 : limited(at.y(value));
              ctx.beginPath();
              for (const i of run) ctx.lineTo(at.x(curve.x[i]), edge(high[i]));
              for (const i of run.reverse()) ctx.lineTo(at.x(curve.x[i]), edge(low[i]));
              ctx.fill();
            }
          }
          if (stroke.fill === 0 || (curve.style ?? 'line') !== 'line') continue;
          ctx.fillStyle = fade(colour, stroke.fill);
          for (const run of runs(kept, (i) => Number.isFinite(curve.y[i]))) {
            ctx.beginPath();
            ctx.moveTo(at.x(curve.x[run[0]]), base);
            for (const i of run) ctx.lineTo(at.x(curve.x[i]), limited(at.y(curve.y[i])));
            ctx.lineTo(at.x(curve.x[run[run.length - 1]]), base);
            ctx.fill();
          }
        }
      });
    },
  };
}

/** Stretches of indices in a row that hold. */
function runs(indices: number[], holds: (index: number) => boolean): number[][] {
  const found: number[][] = [];
  let open: number[] = [];
  for (const index of indices) {
    if (holds(index)) {
      if (open.length === 0) found.push(open);
      open.push(index);
    } else if (open.length > 0) open = [];
  }
  return found;
}

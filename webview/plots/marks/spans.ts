import type { Plugin } from 'chart.js';
import { fade } from '../colours';
import { type Drawn, inside, pixels } from './drawn';

/** Stretches of the horizontal axis, shaded and edged behind the curves. */
export function newSpans(drawn: () => Drawn): Plugin<'line'> {
  return {
    id: 'spans',
    beforeDatasetsDraw(chart) {
      inside(chart, true, (ctx) => {
        const { marks, palette } = drawn();
        const { left, right, top, bottom } = chart.chartArea;
        for (const mark of marks) {
          if (mark.kind !== 'span') continue;
          const edge = (value: number) => {
            const pixel = pixels(chart).x(value);
            // A logarithmic axis has no place for zero.
            return Number.isFinite(pixel) ? Math.min(right + 2, Math.max(left - 2, pixel)) : left - 2;
          };
          const from = edge(mark.from);
          const to = Math.max(edge(mark.to), from + 1);
          ctx.fillStyle = fade(palette.foreground, palette.highContrast ? 0.22 : 0.1);
          ctx.fillRect(from, top, to - from, bottom - top);
          ctx.strokeStyle = fade(palette.foreground, 0.5);
          ctx.lineWidth = 1;
          ctx.setLineDash([2, 3]);
          ctx.beginPath();
          for (const x of [from, to]) {
            ctx.moveTo(x, top);
            ctx.lineTo(x, bottom);
          }
          ctx.stroke();
        }
      });
    },
  };
}

import type { Plugin } from 'chart.js';
import { type Drawn, inside, pixels } from './drawn';

/** A line and a ring where the keyboard or the pointer is. */
export function newCursor(drawn: () => Drawn): Plugin<'line'> {
  return {
    id: 'cursor',
    afterDraw(chart) {
      inside(chart, false, (ctx) => {
        const { cursor, curves, palette } = drawn();
        const curve = cursor === null ? undefined : curves[cursor.curve]?.curve;
        if (cursor === null || curve === undefined) return;
        const x = pixels(chart).x(curve.x[cursor.index]);
        if (!Number.isFinite(x)) return;
        ctx.strokeStyle = palette.focus;
        ctx.lineWidth = 1;
        ctx.beginPath();
        ctx.moveTo(x, chart.chartArea.top);
        ctx.lineTo(x, chart.chartArea.bottom);
        ctx.stroke();
        const y = pixels(chart).y(curve.y[cursor.index]);
        if (!Number.isFinite(y)) return;
        ctx.lineWidth = 2;
        ctx.beginPath();
        ctx.arc(x, y, 7, 0, 2 * Math.PI);
        ctx.stroke();
      });
    },
  };
}

import type { Plugin } from 'chart.js';
import { type Drawn, inside, pixels } from './drawn';

/** Error bars, with caps where there is room for them. */
export function newErrorBars(drawn: () => Drawn): Plugin<'line'> {
  return {
    id: 'errorBars',
    afterDatasetsDraw(chart) {
      inside(chart, true, (ctx) => {
        const at = pixels(chart);
        for (const { curve, colour, kept } of drawn().curves) {
          const { errors } = curve;
          if (!errors) continue;
          const cap = Math.min(4, (0.3 * chart.chartArea.width) / Math.max(1, kept.length));
          ctx.strokeStyle = colour;
          ctx.lineWidth = 1;
          ctx.beginPath();
          for (const i of kept) {
            if (!Number.isFinite(curve.y[i]) || !(errors[i] > 0)) continue;
            const x = at.x(curve.x[i]);
            const top = at.y(curve.y[i] + errors[i]);
            const bottom = at.y(curve.y[i] - errors[i]);
            ctx.moveTo(x, top);
            ctx.lineTo(x, bottom);
            if (cap < 1) continue;
            for (const y of [top, bottom]) {
              ctx.moveTo(x - cap, y);
              ctx.lineTo(x + cap, y);
            }
          }
          ctx.stroke();
        }
      });
    },
  };
}

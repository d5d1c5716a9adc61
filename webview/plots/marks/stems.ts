import type { Plugin } from 'chart.js';
import { type Drawn, inside, pixels } from './drawn';

/** Lines from zero to the points of curves drawn as stems. */
export function newStems(drawn: () => Drawn): Plugin<'line'> {
  return {
    id: 'stems',
    beforeDatasetsDraw(chart) {
      inside(chart, true, (ctx) => {
        const at = pixels(chart);
        const { curves, palette } = drawn();
        const zero = at.y(0);
        const stems = curves.filter(({ curve }) => curve.style === 'stems');
        if (stems.length === 0) return;
        ctx.strokeStyle = palette.muted;
        ctx.lineWidth = 1;
        ctx.beginPath();
        ctx.moveTo(chart.chartArea.left, zero);
        ctx.lineTo(chart.chartArea.right, zero);
        ctx.stroke();
        for (const { curve, stroke, colour, kept } of stems) {
          ctx.strokeStyle = colour;
          ctx.lineWidth = Math.min(stroke.width, Math.max(0.75, chart.chartArea.width / (3 * kept.length)));
          ctx.setLineDash(stroke.dash);
          ctx.beginPath();
          for (const i of kept) {
            if (!Number.isFinite(curve.y[i])) continue;
            const x = at.x(curve.x[i]);
            ctx.moveTo(x, zero);
            ctx.lineTo(x, at.y(curve.y[i]));
          }
          ctx.stroke();
        }
      });
    },
  };
}

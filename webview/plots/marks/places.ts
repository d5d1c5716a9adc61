import type { Plugin } from 'chart.js';
import { type Drawn, inside, pixels } from './drawn';
import { drawShape } from './shapes';

/** The present choice and the suggested one, on top of the curves. */
export function newPlaces(drawn: () => Drawn): Plugin<'line'> {
  return {
    id: 'places',
    afterDatasetsDraw(chart) {
      inside(chart, false, (ctx) => {
        const { marks, palette } = drawn();
        const at = pixels(chart);
        for (const shape of ['now', 'suggested'] as const) {
          for (const mark of marks) {
            if (mark.kind !== 'place' || mark.shape !== shape || !Number.isFinite(mark.y)) continue;
            drawShape(ctx, shape, at.x(mark.x), at.y(mark.y), palette);
          }
        }
      });
    },
  };
}

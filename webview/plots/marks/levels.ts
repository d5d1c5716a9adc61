import type { Plugin } from 'chart.js';
import { fade } from '../colours';
import { type Drawn, inside, pixels } from './drawn';

/** Levels across the plot, each with its label at the end where the curves are farther away. */
export function newLevels(drawn: () => Drawn): Plugin<'line'> {
  return {
    id: 'levels',
    afterDatasetsDraw(chart) {
      inside(chart, true, (ctx) => {
        const { marks, palette, levelStroke } = drawn();
        const { left, right, top } = chart.chartArea;
        const at = pixels(chart);
        const taken: number[] = [];
        ctx.font = `${palette.fontSize}px ${palette.fontFamily}`;
        ctx.textAlign = 'left';
        for (const mark of marks) {
          if (mark.kind !== 'level' || !Number.isFinite(mark.y)) continue;
          const y = at.y(mark.y);
          ctx.strokeStyle = palette.colour(levelStroke.variables);
          ctx.lineWidth = levelStroke.width;
          ctx.setLineDash(levelStroke.dash);
          ctx.beginPath();
          ctx.moveTo(left, y);
          ctx.lineTo(right, y);
          ctx.stroke();
          // Above the line, below it at the top edge; left out where another label is, since the legend has it too.
          const baseline = y - 3 - palette.fontSize < top ? y + 3 + palette.fontSize : y - 4;
          if (taken.some((other) => Math.abs(other - baseline) < palette.fontSize + 2)) continue;
          taken.push(baseline);
          const width = ctx.measureText(mark.label).width;
          const start =
            room(drawn(), at.y, y, 'first') > room(drawn(), at.y, y, 'last') ? left + 2 : right - width - 8;
          ctx.fillStyle = fade(palette.background, 0.75);
          ctx.fillRect(start, baseline - palette.fontSize, width + 6, palette.fontSize + 3);
          ctx.fillStyle = palette.foreground;
          ctx.fillText(mark.label, start + 3, baseline);
        }
      });
    },
  };
}

/** Pixels between a level and the nearest curve at an end of the plot. */
function room(
  { curves }: Drawn,
  toPixel: (value: number) => number,
  level: number,
  end: 'first' | 'last',
): number {
  const distances = curves.map(({ curve, kept }) => {
    const value = curve.y[kept[end === 'first' ? 0 : kept.length - 1]];
    return Number.isFinite(value) ? Math.abs(toPixel(value) - level) : Number.POSITIVE_INFINITY;
  });
  return Math.min(...distances);
}

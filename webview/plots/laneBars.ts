import type { Interval } from '../../core/pair/intervals';
import { fade } from './colours';
import type { Kind } from './data';
import { type Intervals, kinds } from './intervalEnds';
import { barRow, type LanesLayout } from './lanesLayout';
import { pixelOf, type View } from './sampleView';
import { barStrokes } from './strokes';
import type { Palette } from './theme';

/** Bars of the intervals with their names, and their edges through the lanes. */
export function drawBars(
  ctx: CanvasRenderingContext2D,
  layout: LanesLayout,
  intervals: Intervals,
  names: Record<Kind, string>,
  view: View,
  palette: Palette,
): void {
  const { left, across, lanes } = layout;
  const top = lanes[0]?.top ?? 0;
  const bottom = lanes.length > 0 ? lanes[lanes.length - 1].top + lanes[lanes.length - 1].height : 0;
  ctx.save();
  ctx.beginPath();
  ctx.rect(left, 0, across, layout.height);
  ctx.clip();
  ctx.font = `${palette.fontSize}px ${palette.fontFamily}`;
  for (const kind of kinds) {
    const middle = layout.bars[kind];
    if (middle === undefined) continue;
    const stroke = barStrokes[kind];
    const colour = palette.colour(stroke.variables);
    for (const interval of intervals[kind]) {
      const from = left + Math.max(-20, pixelOf(view, across, interval.from));
      const to = left + Math.min(across + 20, pixelOf(view, across, interval.to));
      if (to < left - 10 || from > left + across + 10) continue;
      if (stroke.fill > 0) {
        ctx.fillStyle = fade(colour, palette.highContrast ? 0.18 : stroke.fill);
        ctx.fillRect(from, top, to - from, bottom - top);
      }
      ctx.strokeStyle = colour;
      ctx.lineWidth = 1;
      ctx.setLineDash(stroke.dash);
      ctx.beginPath();
      for (const x of [from, to]) {
        ctx.moveTo(x, Math.min(top, middle));
        ctx.lineTo(x, Math.max(bottom, middle));
      }
      ctx.stroke();
      ctx.lineWidth = stroke.width;
      ctx.beginPath();
      ctx.moveTo(from, middle);
      ctx.lineTo(to, middle);
      ctx.stroke();
      drawName(ctx, names[kind], Math.max(from, left), Math.min(to, left + across), middle, palette);
    }
  }
  ctx.restore();
}

/** The name in the middle of what is in view of a bar, where there is room for it. */
function drawName(
  ctx: CanvasRenderingContext2D,
  name: string,
  from: number,
  to: number,
  middle: number,
  palette: Palette,
): void {
  const width = ctx.measureText(name).width;
  if (to - from < width + 44) return;
  const x = (from + to) / 2;
  ctx.fillStyle = palette.background;
  ctx.fillRect(x - width / 2 - 5, middle - barRow / 2 + 1, width + 10, barRow - 2);
  ctx.fillStyle = palette.foreground;
  ctx.textAlign = 'center';
  ctx.textBaseline = 'middle';
  ctx.fillText(name, x, middle);
}

/** A stretch that was led to, and the reading line. */
export function drawGuides(
  ctx: CanvasRenderingContext2D,
  layout: LanesLayout,
  led: Interval | null,
  cursor: number | null,
  view: View,
  palette: Palette,
): void {
  const { left, across, axis } = layout;
  ctx.save();
  ctx.beginPath();
  ctx.rect(left, 0, across, axis);
  ctx.clip();
  ctx.setLineDash([]);
  ctx.strokeStyle = palette.focus;
  if (led !== null) {
    const from = left + Math.max(-5, pixelOf(view, across, led.from));
    const to = Math.max(from + 3, left + Math.min(across + 5, pixelOf(view, across, led.to)));
    ctx.fillStyle = fade(palette.focus, 0.22);
    ctx.fillRect(from, 0, to - from, axis);
    ctx.lineWidth = 2;
    ctx.strokeRect(from, 1, to - from, axis - 2);
  }
  if (cursor !== null) {
    const x = Math.round(left + pixelOf(view, across, cursor)) + 0.5;
    ctx.lineWidth = 1;
    ctx.beginPath();
    ctx.moveTo(x, 0);
    ctx.lineTo(x, axis);
    ctx.stroke();
  }
  ctx.restore();
}

import { fade } from './colours';
import type { LanesData } from './data';
import { type LanesLayout, valuePixel } from './lanesLayout';
import { pixelOf, type View } from './sampleView';
import { plain } from './shown';
import type { Palette } from './theme';
import { linearTicks, tickText } from './ticks';

/** The time axis, its grid lines through every lane, and each lane's frame, name and levels. */
export function drawAxes(
  ctx: CanvasRenderingContext2D,
  layout: LanesLayout,
  data: LanesData,
  view: View,
  unit: string,
  palette: Palette,
): void {
  const { left, across, axis } = layout;
  const rate = data.sampleRate ?? 1;
  const { values, step } = linearTicks(
    view.from / rate,
    view.to / rate,
    Math.max(2, Math.floor(across / 80)),
  );
  // Whole samples only: where a step is less than one, half of the labels would say the same.
  const ticks = data.sampleRate === null ? values.filter(Number.isInteger) : values;
  ctx.font = `${palette.fontSize}px ${palette.fontFamily}`;
  ctx.lineWidth = 1;
  ctx.setLineDash([]);
  ctx.textBaseline = 'top';
  ctx.textAlign = 'center';
  const first = layout.lanes[0]?.top ?? 0;
  for (const value of ticks) {
    const x = left + pixelOf(view, across, value * rate);
    ctx.strokeStyle = palette.grid;
    line(ctx, x, first, x, axis);
    ctx.strokeStyle = palette.frame;
    line(ctx, x, axis, x, axis + 4);
    ctx.fillStyle = palette.muted;
    const text = tickText(value, data.sampleRate === null ? Math.max(1, step) : step);
    const half = ctx.measureText(text).width / 2;
    ctx.fillText(text, Math.min(layout.width - half - 1, Math.max(half + 1, x)), axis + 6);
  }
  ctx.strokeStyle = palette.frame;
  line(ctx, left, axis, left + across, axis);
  ctx.fillStyle = palette.muted;
  ctx.fillText(unit, left + across / 2, axis + 8 + palette.fontSize);
  data.lanes.forEach((lane, i) => {
    const place = layout.lanes[i];
    const zero = valuePixel(place, lane, 0);
    ctx.strokeStyle = palette.frame;
    ctx.strokeRect(left + 0.5, place.top + 0.5, across - 1, place.height - 1);
    if (zero > place.top && zero < place.top + place.height) {
      ctx.strokeStyle = palette.grid;
      line(ctx, left, zero, left + across, zero);
    }
    ctx.fillStyle = palette.muted;
    ctx.textAlign = 'right';
    for (const [value, baseline] of [
      [lane.max, 'top'],
      [lane.min, 'bottom'],
    ] as const) {
      ctx.textBaseline = baseline;
      ctx.fillText(plain(value, 3), left - 5, place.top + (baseline === 'top' ? 2 : place.height - 2));
    }
  });
}

/** Names inside the lanes, over the waves. */
export function drawLaneNames(
  ctx: CanvasRenderingContext2D,
  layout: LanesLayout,
  data: LanesData,
  palette: Palette,
): void {
  ctx.font = `${palette.fontSize}px ${palette.fontFamily}`;
  ctx.textAlign = 'left';
  ctx.textBaseline = 'top';
  data.lanes.forEach(({ label }, i) => {
    const { top } = layout.lanes[i];
    const width = Math.min(ctx.measureText(label).width, layout.across - 12);
    ctx.fillStyle = fade(palette.background, 0.8);
    ctx.fillRect(layout.left + 2, top + 2, width + 8, palette.fontSize + 5);
    ctx.fillStyle = palette.foreground;
    ctx.fillText(label, layout.left + 6, top + 4, layout.across - 12);
  });
}

function line(ctx: CanvasRenderingContext2D, fromX: number, fromY: number, toX: number, toY: number): void {
  ctx.beginPath();
  ctx.moveTo(Math.round(fromX) + 0.5, Math.round(fromY) + 0.5);
  ctx.lineTo(Math.round(toX) + 0.5, Math.round(toY) + 0.5);
  ctx.stroke();
}

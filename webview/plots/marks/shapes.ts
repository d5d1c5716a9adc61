import type { Palette } from '../theme';

/** The present choice as a filled circle, a suggestion as an open diamond, both edged so that they stand out on any shade. */
export function drawShape(
  ctx: CanvasRenderingContext2D,
  shape: 'now' | 'suggested',
  x: number,
  y: number,
  palette: Palette,
): void {
  ctx.save();
  ctx.setLineDash([]);
  ctx.beginPath();
  if (shape === 'now') ctx.arc(x, y, 5, 0, 2 * Math.PI);
  else {
    ctx.moveTo(x, y - 8);
    ctx.lineTo(x + 8, y);
    ctx.lineTo(x, y + 8);
    ctx.lineTo(x - 8, y);
    ctx.closePath();
  }
  ctx.strokeStyle = palette.background;
  ctx.lineWidth = shape === 'now' ? 3 : 5;
  ctx.stroke();
  if (shape === 'now') {
    ctx.fillStyle = palette.foreground;
    ctx.fill();
  } else {
    ctx.strokeStyle = palette.foreground;
    ctx.lineWidth = 2;
    ctx.stroke();
  }
  ctx.restore();
}

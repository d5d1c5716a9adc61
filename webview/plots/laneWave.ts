import type { Envelope } from '../../core/protocol/messages';
import { fade } from './colours';
import type { LanesData } from './data';
import { type Columns, columnsInView, coverage } from './envelopeColumns';
import { type LanesLayout, valuePixel } from './lanesLayout';
import { pixelOf, type View } from './sampleView';
import { type Stroke, strokeWidth } from './strokes';
import type { Palette } from './theme';

type Lane = LanesData['lanes'][number];

/** Draws a lane: from the fine envelope where it reaches, from the coarse one beside it. */
export function drawWave(
  ctx: CanvasRenderingContext2D,
  layout: LanesLayout,
  number: number,
  lane: Lane,
  stroke: Stroke,
  view: View,
  envelopes: { fine: Envelope | null; coarse: Envelope | null },
  palette: Palette,
): void {
  const { left, across } = layout;
  const place = layout.lanes[number];
  const part = (envelope: Envelope, from: number, to: number) => {
    const found = envelope.lanes.findIndex((other) => other.lane === lane.lane);
    if (found < 0 || to <= from) return;
    ctx.save();
    ctx.beginPath();
    ctx.rect(left + from, place.top, to - from, place.height);
    ctx.clip();
    ctx.translate(left, 0);
    const columns = columnsInView(envelope, found, view, across);
    drawColumns(ctx, columns, (value) => valuePixel(place, lane, value), lane, stroke, palette);
    ctx.restore();
  };
  const { fine, coarse } = envelopes;
  if (fine === null) {
    if (coarse !== null) part(coarse, 0, across);
    return;
  }
  const { from, to } = coverage(fine);
  const start = Math.min(across, Math.max(0, pixelOf(view, across, from)));
  const end = Math.min(across, Math.max(0, pixelOf(view, across, to)));
  if (coarse !== null) {
    part(coarse, 0, start);
    part(coarse, end, across);
  }
  part(fine, start, end);
}

function drawColumns(
  ctx: CanvasRenderingContext2D,
  { x, low, high }: Columns,
  y: (value: number) => number,
  { role }: Lane,
  stroke: Stroke,
  palette: Palette,
): void {
  const colour = palette.colour(stroke.variables);
  ctx.strokeStyle = colour;
  ctx.lineWidth = strokeWidth(stroke, palette.highContrast);
  ctx.lineJoin = 'round';
  for (const { first, last } of filled(low)) {
    const single = isLine(low, high, first, last);
    if (!single || stroke.fill > 0) {
      const base = y(0);
      ctx.fillStyle = fade(colour, fillShare(role, stroke, palette));
      ctx.beginPath();
      for (let i = first; i <= last; i++)
        ctx.lineTo(x[i], stroke.fill > 0 ? Math.min(base, y(high[i])) : y(high[i]));
      for (let i = last; i >= first; i--)
        ctx.lineTo(x[i], stroke.fill > 0 ? Math.max(base, y(low[i])) : y(low[i]));
      ctx.fill();
    }
    ctx.setLineDash(stroke.dash);
    ctx.beginPath();
    for (let i = first; i <= last; i++) ctx.lineTo(x[i], y(high[i]));
    if (!single) {
      ctx.moveTo(x[first], y(low[first]));
      for (let i = first; i <= last; i++) ctx.lineTo(x[i], y(low[i]));
    }
    ctx.stroke();
    if (single) drawSamples(ctx, x, high, y, first, last, colour);
  }
}

/** Of a wave that is filled from low to high; the strokes of its edges tell roles apart as well. */
function fillShare(role: Lane['role'], stroke: Stroke, palette: Palette): number {
  if (stroke.fill > 0) return palette.highContrast ? 0.5 : stroke.fill;
  const share = role === 'output' ? 0.7 : role === 'desired' ? 0.45 : 0.25;
  return palette.highContrast ? Math.min(0.8, share + 0.2) : share;
}

/** Dots on the samples where they are far enough apart. */
function drawSamples(
  ctx: CanvasRenderingContext2D,
  x: number[],
  values: number[],
  y: (value: number) => number,
  first: number,
  last: number,
  colour: string,
): void {
  if (last <= first || (x[last] - x[first]) / (last - first) < 8) return;
  ctx.fillStyle = colour;
  ctx.beginPath();
  for (let i = first; i <= last; i++) {
    ctx.moveTo(x[i] + 2.5, y(values[i]));
    ctx.arc(x[i], y(values[i]), 2.5, 0, 2 * Math.PI);
  }
  ctx.fill();
}

function isLine(low: number[], high: number[], first: number, last: number): boolean {
  for (let i = first; i <= last; i++) if (low[i] !== high[i]) return false;
  return true;
}

/** Stretches of columns that have values. */
function filled(low: number[]): { first: number; last: number }[] {
  const found: { first: number; last: number }[] = [];
  for (let i = 0; i < low.length; i++) {
    if (Number.isNaN(low[i])) continue;
    if (i > 0 && !Number.isNaN(low[i - 1])) found[found.length - 1].last = i;
    else found.push({ first: i, last: i });
  }
  return found;
}

import { blend } from './colours';
import type { Axis, MapData } from './data';
import { type Box, type Cell, cellBox, labelled, placeIn, shadeOf } from './mapCells';
import { drawShape } from './marks/shapes';
import type { Range } from './range';
import { axisTitle, shown } from './shown';
import type { Palette } from './theme';

/** Where the cells are: what the labels of both axes leave. */
export function mapBox(width: number, height: number): Box {
  return { left: 58, top: 8, width: Math.max(20, width - 58 - 12), height: Math.max(20, height - 8 - 38) };
}

/** Colours of a shade: the weakest still differs from the background, the strongest is the theme's accent or its letters. */
export function shadeColour(palette: Palette, share: number): string {
  const full = palette.highContrast ? palette.foreground : palette.accent;
  return blend(palette.background, full, 0.06 + 0.84 * share);
}

/** Draws cells, axes, marks and the cursor. */
export function drawMap(
  ctx: CanvasRenderingContext2D,
  box: Box,
  data: MapData,
  range: Range | null,
  axes: { x: Axis; y: Axis },
  cursor: Cell | null,
  palette: Palette,
): void {
  const columns = data.x.length;
  const rows = data.y.length;
  for (let iy = 0; iy < rows; iy++) {
    for (let ix = 0; ix < columns; ix++) {
      const cell = cellBox(box, columns, rows, { ix, iy });
      const value = data.values[iy * columns + ix];
      if (Number.isNaN(value) || range === null) drawMissing(ctx, cell, palette);
      else {
        ctx.fillStyle = shadeColour(palette, shadeOf(value, range));
        ctx.fillRect(cell.left, cell.top, cell.width, cell.height);
      }
    }
  }
  ctx.strokeStyle = palette.frame;
  ctx.lineWidth = 1;
  ctx.strokeRect(box.left - 0.5, box.top - 0.5, box.width + 1, box.height + 1);
  drawAxes(ctx, box, data, axes, palette);
  for (const shape of ['now', 'suggested'] as const) {
    for (const mark of data.marks) {
      if (mark.shape !== shape) continue;
      const x = box.left + ((placeIn(data.x, mark.x) + 0.5) * box.width) / columns;
      const y = box.top + ((rows - 0.5 - placeIn(data.y, mark.y)) * box.height) / rows;
      drawShape(ctx, shape, x, y, palette);
    }
  }
  if (cursor === null) return;
  const { left, top, width, height } = cellBox(box, columns, rows, cursor);
  for (const [colour, line] of [
    [palette.background, 4],
    [palette.focus, 2],
  ] as const) {
    ctx.strokeStyle = colour;
    ctx.lineWidth = line;
    ctx.strokeRect(left - 1, top - 1, width + 2, height + 2);
  }
}

/** A stroke from corner to corner: no value here. */
function drawMissing(
  ctx: CanvasRenderingContext2D,
  { left, top, width, height }: Box,
  palette: Palette,
): void {
  ctx.strokeStyle = palette.grid;
  ctx.lineWidth = 1;
  ctx.beginPath();
  ctx.moveTo(left, top + height);
  ctx.lineTo(left + width, top);
  ctx.stroke();
}

function drawAxes(
  ctx: CanvasRenderingContext2D,
  box: Box,
  data: MapData,
  axes: { x: Axis; y: Axis },
  palette: Palette,
): void {
  ctx.fillStyle = palette.muted;
  ctx.font = `${palette.fontSize}px ${palette.fontFamily}`;
  ctx.textAlign = 'center';
  ctx.textBaseline = 'top';
  const below = box.top + box.height;
  for (const i of labelled(data.x.length, box.width / 48)) {
    ctx.fillText(shown(data.x[i], ''), box.left + ((i + 0.5) * box.width) / data.x.length, below + 4);
  }
  ctx.fillText(axisTitle(axes.x), box.left + box.width / 2, below + 20);
  ctx.textAlign = 'right';
  ctx.textBaseline = 'middle';
  for (const i of labelled(data.y.length, box.height / 20)) {
    ctx.fillText(shown(data.y[i], ''), box.left - 5, below - ((i + 0.5) * box.height) / data.y.length);
  }
  ctx.save();
  ctx.translate(8, box.top + box.height / 2);
  ctx.rotate(-Math.PI / 2);
  ctx.textAlign = 'center';
  ctx.fillText(axisTitle(axes.y), 0, 0);
  ctx.restore();
}

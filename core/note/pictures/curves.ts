import type { Plot } from './plot';
import { coordinate, ink, shortened, width, xmlText } from './svg';

/** A row of points to draw; `y` may hold values that are not finite, where the line breaks. */
export interface Curve {
  x: ArrayLike<number>;
  y: ArrayLike<number>;
}

const colours = ['#0b5cad', '#b3400a', '#1a7f37', '#7a3fb5', '#8a6100', '#24292f'];
const dashes = ['', '7 4', '2 3', '10 3 2 3'];

/** Told apart by dash as well as by colour; differs for the first twelve. */
export function strokeOf(index: number): string {
  const dash = dashes[index % dashes.length];
  return `stroke="${colours[index % colours.length]}"${dash === '' ? '' : ` stroke-dasharray="${dash}"`}`;
}

/** The colour of the stroke of that index. */
export function fillOf(index: number): string {
  return colours[index % colours.length];
}

/** The curve as a path; long ones are reduced to the lowest and the highest value of each column. */
export function curvePath(plot: Plot, curve: Curve, index: number): string {
  const shown = shownIndices(curve.y, plot.right - plot.left);
  const d = brokenLine(shown.map((i): [number, number] => [plot.x(curve.x[i]), plot.y(curve.y[i])]));
  return `<path d="${d}" fill="none" stroke-width="1.5" stroke-linejoin="round" ${strokeOf(index)}/>`;
}

/** The data of a path through points; it breaks where one is not finite. */
export function brokenLine(points: readonly [number, number][]): string {
  let path = '';
  let open = false;
  for (const [x, y] of points) {
    const finite = Number.isFinite(y);
    if (finite) path += `${open ? 'L' : 'M'}${coordinate(x)},${coordinate(y)}`;
    open = finite;
  }
  return path;
}

/** The lowest and the highest value of each column, where there are more than two a column. */
export function shownIndices(y: ArrayLike<number>, columns: number): number[] {
  if (y.length <= 2 * columns) return Array.from({ length: y.length }, (_, i) => i);
  const shown: number[] = [];
  for (let c = 0; c < columns; c++) {
    const from = Math.floor((c * y.length) / columns);
    const to = Math.floor(((c + 1) * y.length) / columns);
    let low = from;
    let high = from;
    for (let i = from; i < to; i++) {
      if (y[i] < y[low]) low = i;
      if (y[i] > y[high]) high = i;
    }
    shown.push(Math.min(low, high));
    if (low !== high) shown.push(Math.max(low, high));
  }
  return shown;
}

const rowHeight = 18;
const margin = 16;

/** Samples of the curves' strokes with their labels, in as many rows as they need, from `top` on. */
export function legend(labels: readonly string[], top: number): { body: string[]; bottom: number } {
  const body: string[] = [];
  let x = margin;
  let y = top + rowHeight / 2;
  labels.forEach((label, i) => {
    const text = shortened(label);
    const room = 34 + 7.2 * text.length + 18;
    if (x > margin && x + room > width - margin) {
      x = margin;
      y += rowHeight;
    }
    body.push(
      `<path d="M${coordinate(x)},${y}h26" fill="none" stroke-width="2" ${strokeOf(i)}/>`,
      `<text x="${coordinate(x + 32)}" y="${y + 4}" fill="${ink}">${xmlText(text)}</text>`,
    );
    x += room;
  });
  return { body, bottom: y + rowHeight / 2 };
}

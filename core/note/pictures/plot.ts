import { type LinearScale, linearScale } from './linearScale';
import { coordinate, faintInk, ink, width, xmlText } from './svg';

/** A rectangle with two linear scales. */
export interface Plot {
  left: number;
  right: number;
  top: number;
  bottom: number;
  x: LinearScale;
  y: LinearScale;
}

const left = 76;
const right = width - 24;

/**
 * A plot across the picture.
 * @param y range of the values; widened to round numbers, and made non-empty
 */
export function newPlot(top: number, height: number, x: [number, number], y: [number, number]): Plot {
  const bottom = top + height;
  return {
    left,
    right,
    top,
    bottom,
    x: linearScale(nonEmpty(x), [left, right]),
    y: linearScale(nonEmpty(y), [bottom, top], ticksFor(height)),
  };
}

function nonEmpty([from, to]: [number, number]): [number, number] {
  return from < to ? [from, to] : [from - 0.5, to + 0.5];
}

function ticksFor(height: number): number {
  return Math.max(3, Math.round(height / 40));
}

/** Very small and very large values with an exponent, so that they fit beside the plot. */
function labels(scale: Plot['y'], count: number): (value: number) => string {
  const size = Math.max(...scale.domain().map(Math.abs));
  return size < 1e-2 || size >= 1e5 ? scale.tickLabel(count, 'exponent') : scale.tickLabel(count);
}

/** A place on an axis and what stands there. */
export interface Tick {
  at: number;
  label: string;
}

/**
 * Grid, tick labels and axis titles.
 * @param xTicks about how many along x, or which
 */
export function axes(
  plot: Plot,
  xTitle: string,
  yTitle: string,
  xTicks: number | readonly Tick[] = 8,
): string[] {
  const { x, y, top, bottom } = plot;
  const ticks = typeof xTicks === 'number' ? roundTicks(x, xTicks) : xTicks;
  const yTicks = y.ticks(ticksFor(bottom - top));
  const yLabel = labels(y, ticksFor(bottom - top));
  const middle = coordinate((top + bottom) / 2);
  return [
    `<g stroke="#d8dee4" stroke-width="1">`,
    ...ticks.map(({ at }) => `<path d="M${coordinate(x(at))},${top}V${bottom}"/>`),
    ...yTicks.map((t) => `<path d="M${left},${coordinate(y(t))}H${right}"/>`),
    '</g>',
    `<rect x="${left}" y="${top}" width="${right - left}" height="${bottom - top}" fill="none" stroke="${faintInk}"/>`,
    `<g fill="${faintInk}" text-anchor="middle">`,
    ...ticks.map(
      ({ at, label }) => `<text x="${coordinate(x(at))}" y="${bottom + 17}">${xmlText(label)}</text>`,
    ),
    '</g>',
    `<g fill="${faintInk}" text-anchor="end">`,
    ...yTicks.map((t) => `<text x="${left - 7}" y="${coordinate(y(t) + 4)}">${xmlText(yLabel(t))}</text>`),
    '</g>',
    `<text x="${(left + right) / 2}" y="${bottom + 37}" text-anchor="middle" fill="${ink}">${xmlText(xTitle)}</text>`,
    `<text transform="translate(20,${middle}) rotate(-90)" text-anchor="middle" fill="${ink}">${xmlText(yTitle)}</text>`,
  ];
}

function roundTicks(x: Plot['x'], count: number): Tick[] {
  const label = x.tickLabel(count);
  return x.ticks(count).map((at) => ({ at, label: label(at) }));
}

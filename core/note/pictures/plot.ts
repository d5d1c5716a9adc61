import { type ScaleLinear, scaleLinear } from 'd3-scale';
import { coordinate, faintInk, ink, width, xmlText } from './svg';

/** A rectangle with two linear scales. */
export interface Plot {
  left: number;
  right: number;
  top: number;
  bottom: number;
  x: ScaleLinear<number, number>;
  y: ScaleLinear<number, number>;
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
    x: scaleLinear(nonEmpty(x), [left, right]),
    y: scaleLinear(nonEmpty(y), [bottom, top]).nice(ticksFor(height)),
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
  return size < 1e-2 || size >= 1e5 ? scale.tickFormat(count, '~e') : scale.tickFormat(count);
}

/** Grid, tick labels (about `xCount` of them along x) and axis titles. */
export function axes(plot: Plot, xTitle: string, yTitle: string, xCount = 8): string[] {
  const { x, y, top, bottom } = plot;
  const xTicks = x.ticks(xCount);
  const yTicks = y.ticks(ticksFor(bottom - top));
  const xLabel = x.tickFormat(xCount);
  const yLabel = labels(y, ticksFor(bottom - top));
  const middle = coordinate((top + bottom) / 2);
  return [
    `<g stroke="#d8dee4" stroke-width="1">`,
    ...xTicks.map((t) => `<path d="M${coordinate(x(t))},${top}V${bottom}"/>`),
    ...yTicks.map((t) => `<path d="M${left},${coordinate(y(t))}H${right}"/>`),
    '</g>',
    `<rect x="${left}" y="${top}" width="${right - left}" height="${bottom - top}" fill="none" stroke="${faintInk}"/>`,
    `<g fill="${faintInk}" text-anchor="middle">`,
    ...xTicks.map((t) => `<text x="${coordinate(x(t))}" y="${bottom + 17}">${xmlText(xLabel(t))}</text>`),
    '</g>',
    `<g fill="${faintInk}" text-anchor="end">`,
    ...yTicks.map((t) => `<text x="${left - 7}" y="${coordinate(y(t) + 4)}">${xmlText(yLabel(t))}</text>`),
    '</g>',
    `<text x="${(left + right) / 2}" y="${bottom + 37}" text-anchor="middle" fill="${ink}">${xmlText(xTitle)}</text>`,
    `<text transform="translate(20,${middle}) rotate(-90)" text-anchor="middle" fill="${ink}">${xmlText(yTitle)}</text>`,
  ];
}

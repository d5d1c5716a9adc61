import type { Band } from '../../suitability/pair/bands';
import type { Plot } from './plot';
import { coordinate } from './svg';

/**
 * Grey bars over bands of frequencies in which a response says nothing.
 * @param divisor of Hz into the unit of the axis
 */
export function bandShades(plot: Plot, bands: readonly Band[], divisor: number): string[] {
  return bands.map(({ from, to }) => {
    const left = plot.x(from / divisor);
    const width = Math.max(1, plot.x(to / divisor) - left);
    return `<rect x="${coordinate(left)}" y="${plot.top}" width="${coordinate(width)}" height="${plot.bottom - plot.top}" fill="#57606a" fill-opacity="0.15"/>`;
  });
}

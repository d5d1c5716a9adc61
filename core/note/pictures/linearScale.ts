import { nice, tickStep, ticks } from 'd3-array';
import { format, precisionFixed, precisionRound } from 'd3-format';

/** Places along an axis of values. */
export interface LinearScale {
  (value: number): number;
  /** Smallest and largest value. */
  domain(): [number, number];
  /** About so many round values. */
  ticks(count: number): number[];
  /** Writes round values, about so many of them along the axis: as few digits as tell them apart. */
  tickLabel(count: number, notation?: 'fixed' | 'exponent'): (value: number) => string;
}

/**
 * @param domain rising
 * @param range places of its ends
 * @param roundTo where given, the domain is widened to values as round as about so many ticks
 */
export function linearScale(
  domain: [number, number],
  range: [number, number],
  roundTo?: number,
): LinearScale {
  const [from, to] = roundTo === undefined ? domain : nice(...domain, roundTo);
  const place = (value: number) => range[0] + ((value - from) / (to - from)) * (range[1] - range[0]);
  return Object.assign(place, {
    domain: (): [number, number] => [from, to],
    ticks: (count: number) => ticks(from, to, count),
    tickLabel(count: number, notation: 'fixed' | 'exponent' = 'fixed') {
      const step = tickStep(from, to, count);
      if (notation === 'fixed') return format(`,.${precisionFixed(step)}f`);
      const digits = precisionRound(step, Math.max(Math.abs(from), Math.abs(to)));
      return format(`.${Math.max(0, digits - 1)}~e`);
    },
  });
}

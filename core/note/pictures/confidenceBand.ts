import { normal95 } from '../../confidence/tapErrors';
import { responseWithErrors } from '../../figures/responseErrors';
import type { DesignResult } from '../../pipeline/designResult';
import { fillOf } from './curves';
import type { Plot } from './plot';
import { coordinate } from './svg';

/**
 * The 95 % band of the magnitude of one input's response as a filled area behind its curve; empty where no errors are
 * known.
 * @param highest right end of the x axis, half the sample rate
 * @param range of the values in dB that the plot shows; the band is cut off there
 */
export function magnitudeBand(
  { coefficients, confidence: { errors } }: DesignResult,
  r: number,
  plot: Plot,
  highest: number,
  [low, high]: [number, number],
): string {
  const variances = 'withheld' in errors ? undefined : errors.response.inputs[r];
  if (variances === undefined) return '';
  const { magnitude, magnitudeError } = responseWithErrors(coefficients[r], variances);
  const last = magnitude.length - 1;
  const point = (i: number, sign: number) => {
    const edge = Math.max(0, magnitude[i] + sign * normal95 * magnitudeError[i]);
    const decibels = Math.min(high, Math.max(low, 20 * Math.log10(edge)));
    return `${coordinate(plot.x((highest * i) / last))},${coordinate(plot.y(decibels))}`;
  };
  const places = Array.from(magnitude, (_, i) => i);
  const edge = [...places.map((i) => point(i, 1)), ...places.reverse().map((i) => point(i, -1))];
  return `<path d="M${edge.join('L')}Z" fill="${fillOf(r)}" fill-opacity="0.18" stroke="none"/>`;
}

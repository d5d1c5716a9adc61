import { decibels, powerDecibels } from '../figures/decibels';
import { counted, grouped, significant } from '../figures/numbers';
import { frequency } from '../figures/units';
import { visible } from '../figures/visible';
import type { DesignChange } from './compareDesigns';

/** The change in two lines: of the taps, then of what they do. */
export function changeInWords(change: DesignChange): [string, string] {
  const { largest, relative, response, values, length, delay } = change;
  const shape = [
    moved('length', length.before, length.after),
    moved('delay', delay.before, delay.after),
  ].filter((text) => text !== null);
  const taps =
    relative === 0
      ? 'the taps are the same'
      : `${relative === null ? 'the taps were zero' : `taps by ${decibels(powerDecibels(relative * relative))} of their size`}, most w[${largest.k}] of ${visible(largest.input)}: ${significant(largest.before)} to ${significant(largest.after)}`;
  const numbers =
    values === null
      ? length.before === length.after
        ? 'another word or other fraction bits'
        : null
      : `${grouped(values.different)} of ${counted(values.of, 'written value')} differ`;
  const magnitude =
    response.magnitudeDb === 0
      ? 'response the same'
      : `response by at most ${decibels(response.magnitudeDb)} at ${frequency(Number(response.magnitudeAt.toPrecision(3)))}`;
  const figures = [
    figure('held out', change.heldOutNmseDb),
    figure('in the target', change.targetNmseDb),
  ].filter((text) => text !== null);
  return [
    [...shape, taps, numbers].filter((text) => text !== null).join('; '),
    [magnitude, ...figures].join('; '),
  ];
}

function moved(what: string, before: number, after: number): string | null {
  return before === after ? null : `${what} ${before} to ${after}`;
}

function figure(what: string, { before, after }: DesignChange['heldOutNmseDb']): string | null {
  if (before === null && after === null) return null;
  return `${what} ${decibels(before)} to ${decibels(after)}`;
}

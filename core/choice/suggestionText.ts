import { decibels, powerDecibels } from '../figures/decibels';
import { counted, grouped, significant } from '../figures/numbers';
import type { LengthStep, Suggestion } from './suggest';

/**
 * The suggestion explained in two sentences: which rule led to it, then what a step to either side costs in
 * multiply-accumulates and in error.
 * @param blocks left-out blocks
 * @param macs multiply-accumulates of a sample for a filter of that length
 */
export function suggestionText(
  { chosen, best, excess, standardError, steps }: Suggestion,
  blocks: number,
  macs: (length: number) => number,
): string {
  const { length, delay, regularisation, nmse } = chosen;
  const what = `${counted(length, 'tap')} with delay ${delay} and regularisation ${significant(regularisation)}`;
  const error = decibels(powerDecibels(nmse));
  const bestError = decibels(powerDecibels(best.nmse));
  const first =
    best.length === length && best.delay === delay && best.regularisation === regularisation
      ? `${what} have the least cross-validated error of all candidates, ${error}, and no shorter filter comes within one standard error of the differences over the ${blocks} left-out blocks, or 0.05 dB.`
      : `${what} make the shortest filter (then the best delay, then the most regularisation) whose cross-validated error, ${error}, exceeds the best, ${bestError} with ${counted(best.length, 'tap')}, by no more than one standard error of the differences over the ${blocks} left-out blocks, or 0.05 dB (${share(excess, best.nmse)} against ${share(standardError, best.nmse)}).`;
  const place = steps.findIndex((step) => step.length === length);
  const shorter = steps[place - 1];
  const cost = `It costs ${counted(macs(length), 'multiply-accumulate')} a sample`;
  const parts = [
    best.length === length ? cost : `${cost} where the best costs ${grouped(macs(best.length))}`,
    shorter === undefined
      ? 'and no shorter filter was tried'
      : `and the next shorter one, ${counted(shorter.length, 'tap')}, would save ${grouped(macs(length) - macs(shorter.length))} and lose ${loss(shorter, nmse)}`,
  ];
  return `${first} ${parts.join(', ')}.`;
}

/** A share of the desired signal's power as the rise in dB over the best that it stands for. */
function share(part: number, best: number): string {
  return small(powerDecibels(1 + part / best));
}

function loss(step: LengthStep, nmse: number): string {
  return small(powerDecibels(step.nmse / nmse));
}

function small(value: number): string {
  return value > 0 && value < 0.005 ? 'less than 0.01 dB' : decibels(value);
}

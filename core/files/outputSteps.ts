import { typed } from '../figures/numbers';
import { samplesAndTime } from '../figures/units';
import type { DesignResult } from '../pipeline/designResult';
import type { StepStyle } from './firmwareSteps';
import { signalWords } from './signalWords';

/** True where the firmware adds the desired signal's mean back to the output. */
export function addsDesiredMean({ document }: DesignResult): boolean {
  return document.prepare.removeMean && document.job !== 'cancel';
}

/** The steps after the filter: the desired signal's mean, and what the output is used for. */
export function outputSteps(result: DesignResult, style: StepStyle): string[] {
  return [...desiredMean(result, style), use(result, style)];
}

function integerOutput({ document }: DesignResult): boolean {
  return typeof signalWords(document).output === 'number';
}

function desiredMean(result: DesignResult, { name }: StepStyle): string[] {
  const { document, arithmetic, desired } = result;
  if (!document.prepare.removeMean) return [];
  if (document.job === 'cancel') {
    return [
      `Leave the mean of the desired signal ${name(desired)} in it: take nothing off d and add nothing to y.`,
    ];
  }
  const mean = typed(arithmetic.desiredMeanCounts);
  return [
    integerOutput(result)
      ? `Add ${mean} counts, the mean of the desired signal ${name(desired)}, to y, and saturate again.`
      : `Add ${mean}, the mean of the desired signal ${name(desired)}, to y.`,
  ];
}

/** `counts of the output, 512 a unit`. */
function outputUnit(result: DesignResult): string {
  return integerOutput(result)
    ? `counts of the output word (${typed(1 / result.arithmetic.outputCount)} a unit, full scale ${typed(result.arithmetic.outputFullScale)})`
    : 'the unit of the recording';
}

function use(result: DesignResult, { name, formula }: StepStyle): string {
  const { document, sampleRate } = result;
  const { delay } = document.filter;
  const d = name(result.desired);
  const time = samplesAndTime(Math.abs(delay), sampleRate);
  const past = formula(delay > 0 ? `d[n - ${delay}]` : 'd[n]');
  switch (document.job) {
    case 'cancel': {
      const late = delay > 0 ? `Delay the desired signal ${d} by ${time}, then subtract` : 'Subtract';
      const error = formula(delay > 0 ? `e[n] = d[n - ${delay}] - y[n]` : 'e[n] = d[n] - y[n]');
      const bits = integerOutput(result) ? '; the difference can need one bit more than d and y' : '';
      return `${late}: ${error} is the cleaned signal, d being ${d}, with d and y in ${outputUnit(result)}${bits}.`;
    }
    case 'identify': {
      const late = delay > 0 ? `; to compare them, delay the desired signal by ${time}` : '';
      return `Use y as the model's estimate of ${past}, d being ${d}, in ${outputUnit(result)}${late}.`;
    }
    case 'equalise': {
      const late =
        delay > 0
          ? `; it comes ${time} after the signal it restores, so delay by as much whatever is used together with it`
          : '';
      return `Use y as the restored signal, the estimate of ${past}, d being ${d}, in ${outputUnit(result)}${late}.`;
    }
    case 'predict':
      return delay < 0
        ? `Use y as the forecast of ${formula(`d[n + ${-delay}]`)}, d being ${d}, ${time} ahead of the newest input sample, in ${outputUnit(result)}. Nothing is delayed.`
        : `Use y as the estimate of ${past}, d being ${d}, in ${outputUnit(result)}.`;
  }
}

import { typed } from '../figures/numbers';
import { samplesAndTime } from '../figures/units';
import { wordRange } from '../numbers/words';
import type { DesignResult } from '../pipeline/designResult';
import { filterSteps } from './filterSteps';
import { wordInWords } from './numberTypes';
import { outputSteps } from './outputSteps';
import { signalWords } from './signalWords';

/** How the steps are set: names come from documents and need the escapes of the language around them. */
export interface StepStyle {
  name(text: string): string;
  formula(text: string): string;
}

/**
 * What the firmware does at every sample n, from the raw samples to the use of the output, one sentence or two a step,
 * with the figures of this design. The sentences are ASCII where the style's are.
 */
export function firmwareSteps(result: DesignResult, style: StepStyle): string[] {
  return [
    ...scaling(result, style),
    ...means(result, style),
    ...inputDelay(result, style),
    ...filterSteps(result, style),
    ...outputSteps(result, style),
  ];
}

function scaling({ document, arithmetic, inputs }: DesignResult, { name, formula }: StepStyle): string[] {
  const word = signalWords(document).input;
  if (typeof word !== 'number') return [];
  if (arithmetic.inputCount.every((q) => q === 1)) {
    return [`Take every input in counts of ${wordInWords(word)} words, as recorded (one count is one unit).`];
  }
  const scales = inputs.map(
    (label, r) =>
      `${name(label)}: ${typed(1 / arithmetic.inputCount[r])} counts a unit (full scale ${typed(arithmetic.inputFullScale[r])})`,
  );
  return [
    `Bring every input to counts of ${wordInWords(word)} words, ${formula('count = floor(raw * counts a unit + 1/2)')}, raw in the unit of the recording: ${scales.join('; ')}.`,
  ];
}

function means({ document, arithmetic, inputs }: DesignResult, { name, formula }: StepStyle): string[] {
  if (!document.prepare.removeMean) {
    return ['Take no mean off the inputs: the filter was fitted to the signals as recorded.'];
  }
  const word = signalWords(document).input;
  const counts = typeof word === 'number' ? ' counts' : '';
  const list = inputs.map((label, r) => `${name(label)}: ${typed(arithmetic.inputMeanCounts[r])}${counts}`);
  const off = `Take the mean off every input, always these constants and never a running mean: ${list.join('; ')}`;
  if (typeof word !== 'number') return [`${off}.`];
  const { min, max } = wordRange(word);
  return [`${off}. Saturate the difference to ${formula(`${min} .. ${max}`)}; call it x.`];
}

function inputDelay({ document, sampleRate, inputs }: DesignResult, { formula }: StepStyle): string[] {
  const { delay } = document.filter;
  if (delay >= 0 || document.job === 'predict') return [];
  const signal = inputs.length === 1 ? 'the input' : 'every input';
  return [
    `Delay ${signal} by ${samplesAndTime(-delay, sampleRate)} before the filter (the design's delay is ${formula(String(delay))}); the desired signal is not delayed.`,
  ];
}

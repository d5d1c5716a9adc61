import { counted } from '../figures/numbers';
import { wordRange } from '../numbers/words';
import type { DesignResult } from '../pipeline/designResult';
import type { StepStyle } from './firmwareSteps';

/** The steps of the filter itself: history, sum, rounding, shift, output word. */
export function filterSteps(result: DesignResult, style: StepStyle): string[] {
  return [
    history(result),
    ...symmetry(result),
    ...(result.arithmetic.fractionBits === null ? floats(result, style) : integers(result, style)),
  ];
}

function history({ document, inputs }: DesignResult): string {
  const { length, delay } = document.filter;
  const lag = document.job === 'predict' ? 0 : Math.max(0, -delay);
  const unusable = length - 1 + lag;
  const of = inputs.length === 1 ? 'the input' : 'every input';
  const keep = `Keep the last ${counted(length, 'sample')} of ${of}, zero at the start`;
  return unusable === 0
    ? `${keep}.`
    : `${keep}; do not use the first ${counted(unusable, 'output')} after a start, which still see those zeros.`;
}

/** Half the multiplications, where the taps allow it; the sum stays the same. */
function symmetry({ document }: DesignResult): string[] {
  const { symmetry: kind, length } = document.filter;
  if (kind === 'none') return [];
  const sign = kind === 'even' ? 'plus' : 'minus';
  return [
    `The taps mirror each other: multiply x[n - k] ${sign} x[n - ${length - 1} + k], which needs one bit more than x, once by tap[k]. In an accumulator that saturates the order of additions counts: there multiply one by one.`,
  ];
}

function sum({ document, inputs }: DesignResult): string {
  const last = document.filter.length - 1;
  return inputs.length === 1
    ? `sum over k = 0 .. ${last} of tap[k] * x[n - k]`
    : `sum over r = 0 .. ${inputs.length - 1} and k = 0 .. ${last} of tap_r[k] * x_r[n - k]`;
}

function floats(result: DesignResult, { formula }: StepStyle): string[] {
  const { word } = result.document.arithmetic;
  return [
    `Compute ${formula(`y[n] = ${sum(result)}`)} in ${word}, every product and every sum rounded, in this order; another order, or a fused multiply-add, changes the last digits.`,
  ];
}

function integers(result: DesignResult, { formula }: StepStyle): string[] {
  const { accumulator, accumulatorOverflow, overflow, output } = result.document.arithmetic;
  const { worstCase } = result.arithmetic;
  const fraction = result.arithmetic.fractionBits ?? 0;
  const rule =
    accumulatorOverflow === 'wrap'
      ? `every addition wraps modulo ${formula(`2^${accumulator}`)}`
      : `every addition stops at the limits of ${accumulator} bits`;
  const room =
    worstCase !== null && worstCase.bits <= accumulator
      ? `no input can overflow it, since the worst case, rounding included, needs ${worstCase.bits} bits`
      : `the worst case needs ${worstCase?.bits ?? 'more'} bits, so it can overflow: ${rule}`;
  const accumulate = `Compute ${formula(`acc = ${sum(result)}`)} in an accumulator of ${accumulator} bits; ${room}.`;
  const { min, max } = wordRange(typeof output.word === 'number' ? output.word : 32);
  const fit =
    overflow === 'saturate'
      ? `Saturate y to ${formula(`${min} .. ${max}`)}`
      : `Keep the low ${output.word} bits of y, two's complement (it wraps)`;
  const round =
    fraction === 0
      ? `There are no fraction bits: ${formula('y = acc')}.`
      : `Round: ${formula(`y = floor((acc + 2^${fraction - 1}) / 2^${fraction})`)}, that is, add ${formula(`2^${fraction - 1}`)}, then shift right by ${fraction} so that negative numbers go down, not towards zero.`;
  return [accumulate, `${round} ${fit}.`];
}

import { inputCounts, inputFloats } from './inputCounts';
import type { IntegerFormat, Scaling } from './scaling';
import { floatSimulator, integerSimulator, type Simulator } from './simulate';

/** The filter as the target runs it: numbers of its words and the rules of their arithmetic. */
export interface TargetFilter {
  /** One row an input, newest-first: integers, or floats of the word. */
  values: Float64Array[];
  scaling: Scaling;
  format: IntegerFormat | 'float32' | 'float64';
}

/** Integer format of a target filter; null where it computes in floats. */
export function integerFormat({ format }: TargetFilter): IntegerFormat | null {
  return typeof format === 'string' ? null : format;
}

/** What the target's filter sees of raw samples of one input. */
export function targetInput(target: TargetFilter, input: number, raw: Float64Array): Float64Array {
  return typeof target.format === 'string'
    ? inputFloats(raw, input, target.format, target.scaling)
    : inputCounts(raw, input, target.format.inputWord, target.scaling);
}

/** Runs the target's filter over what {@link targetInput} gives. */
export function targetSimulator({ values, format }: TargetFilter): Simulator {
  return typeof format === 'string' ? floatSimulator(values, format) : integerSimulator(values, format);
}

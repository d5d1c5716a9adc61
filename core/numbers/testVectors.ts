import { type TargetFilter, targetSimulator } from './targetFilter';

/** Test vectors for the firmware; the history before them is zero. */
export interface TestVectors {
  /** One row an input: what the filter sees, means taken off; counts, or amplitudes for float words. */
  input: Float64Array[];
  /** Bit-exact output. */
  expected: Float64Array;
}

/** The target's output for the given inputs after silence. */
export function testVectors(target: TargetFilter, input: readonly Float64Array[]): TestVectors {
  const history = target.values[0].length - 1;
  const padded = input.map((samples) => {
    const whole = new Float64Array(history + samples.length);
    whole.set(samples, history);
    return whole;
  });
  return { input: [...input], expected: targetSimulator(target)(padded).output };
}

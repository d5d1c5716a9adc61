import { filterStretch } from '../evaluation/filterStretch';
import type { Pace } from '../pace';
import type { SignalReader, Signals } from '../pair/signals';

/**
 * Reads the inputs and, as one more, the residual `e[n] = d[n-Δ] - y[n]`; as the desired signal the residual again. So the
 * sums of the normal equations of these signals are the correlations of inputs and residual.
 * @param read of the take
 * @param coefficients one row an input, newest-first
 * @param start first n: the residual before it and inputs more than M-1 samples before it are never read and given as zero
 */
export function residualReader(
  read: SignalReader,
  coefficients: readonly Float64Array[],
  start: number,
  pace: Pace,
): SignalReader {
  const inputs = coefficients.length;
  const reach = coefficients[0].length - 1;
  return async (from, to, history = 0) => {
    const first = from - history;
    const rows = Array.from({ length: inputs + 1 }, () => new Float64Array(to - first));
    const residual = rows[inputs];
    const begin = Math.max(first, start);
    if (begin >= to) {
      const past = Math.min(history, to - (start - reach));
      if (past > 0) {
        const { inputs: x } = await read(to, to, past);
        for (let r = 0; r < inputs; r++) rows[r].set(x[r], to - past - first);
      }
    }
    await filterStretch(read, { from: begin, to: Math.max(begin, to) }, coefficients, pace, (block) => {
      const at = block.from - first;
      for (let r = 0; r < inputs; r++) {
        const skipped = Math.max(0, reach - at);
        rows[r].set(block.inputs[r].subarray(skipped), at - reach + skipped);
      }
      for (let n = 0; n < block.desired.length; n++) residual[at + n] = block.desired[n] - block.output[n];
    });
    return signals(rows, history);
  };
}

/** The same reader with the residual zero before `start` and the inputs zero more than `reach` samples before it. */
export function bounded(read: SignalReader, start: number, reach: number): SignalReader {
  return async (from, to, history = 0) => {
    const { inputs } = await read(from, to, history);
    const first = from - history;
    const last = inputs.length - 1;
    inputs.forEach((row, r) => {
      const begin = r === last ? start : start - reach;
      row.fill(0, 0, Math.max(0, begin - first));
    });
    return signals(inputs, history);
  };
}

function signals(rows: Float64Array[], history: number): Signals {
  return { inputs: rows, desired: rows[rows.length - 1].subarray(history) };
}

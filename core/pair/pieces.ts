import type { Interval } from './intervals';
import type { SignalReader, Signals } from './signals';

/** Samples that are read at a time where blocks are shorter. */
const pieceSamples = 65536;

/**
 * Walks a stretch of n block by block, but reads many blocks at a time: a reading costs much more than a block.
 * @param history samples of the inputs before each block
 * @param visit called with each block in turn; its signals are views that hold until the next piece is read
 */
export async function eachBlock(
  read: SignalReader,
  stretch: Interval,
  block: number,
  history: number,
  visit: (signals: Signals, from: number, to: number) => void | Promise<void>,
): Promise<void> {
  const piece = block * Math.max(1, Math.floor(pieceSamples / block));
  for (let start = stretch.from; start < stretch.to; start += piece) {
    const end = Math.min(stretch.to, start + piece);
    const { inputs, desired } = await read(start, end, history);
    for (let from = start; from < end; from += block) {
      const to = Math.min(end, from + block);
      const signals = {
        inputs: inputs.map((samples) => samples.subarray(from - start, to - start + history)),
        desired: desired.subarray(from - start, to - start),
      };
      const pending = visit(signals, from, to);
      if (pending !== undefined) await pending;
    }
  }
}

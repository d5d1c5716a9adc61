import { filterStretch } from '../../../core/evaluation/filterStretch';
import { newPace } from '../../../core/pace';
import type { SignalReader } from '../../../core/pair/signals';
import { sumStretch } from '../../../core/statistics/sumStretch';
import { normals } from '../../support/random';
import { longPair, longSamples, writeDoubles } from '../data';
import { runReference } from '../python';
import { type Row, timed } from '../row';

let pair: ReturnType<typeof longPair> | null = null;
const taps = normals(4, 1024);

function inMemory(): ReturnType<typeof longPair> {
  pair ??= longPair(longSamples);
  return pair;
}

/** Frees the arrays for the rows that follow. */
export function forgetSignals(): void {
  pair = null;
}

let written = '';

/** The rows share their data. */
function prepare(folder: string): void {
  if (written === folder) return;
  written = folder;
  const { x, d } = inMemory();
  writeDoubles(folder, 'x.f64', x);
  writeDoubles(folder, 'd.f64', d);
  writeDoubles(folder, 'w.f64', taps);
}

/** Reads arrays in memory by views where the range lies inside. */
function reader({ x, d }: ReturnType<typeof longPair>): SignalReader {
  return async (from, to, history = 0) => {
    if (from >= history) return { inputs: [x.subarray(from - history, to)], desired: d.subarray(from, to) };
    const whole = new Float64Array(to - from + history);
    whole.set(x.subarray(0, to), history - from);
    return { inputs: [whole], desired: d.subarray(from, to) };
  };
}

const whole = { from: 1023, to: longSamples };
const correlations = () => timed(() => sumStretch(reader(inMemory()), whole, 1, 1024, true, newPace()));

export const signalRows: Row[] = [
  {
    name: 'correlations, 1,024 lags, 28.8 M samples in memory; chunked `oaconvolve`',
    goal: 0.3,
    prepare,
    ours: correlations,
    reference: (folder) => runReference('correlations_chunked', folder),
  },
  {
    name: 'the same; batched `rfft`',
    goal: 1.8,
    prepare,
    ours: correlations,
    reference: (folder) => runReference('correlations_batched', folder),
  },
  {
    name: 'overlap-save, 28.8 M samples, 1,024 taps; `oaconvolve`',
    goal: 0.4,
    prepare,
    ours: () =>
      timed(() =>
        filterStretch(reader(inMemory()), { from: 0, to: longSamples }, [taps], newPace(), () => {}),
      ),
    reference: (folder) => runReference('overlap_save', folder),
  },
];

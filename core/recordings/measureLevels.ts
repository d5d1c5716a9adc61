import type { Pace } from '../pace';
import { newRunningMoments, type RunningMoments } from '../statistics/runningMoments';
import type { Levels } from './levels';
import { newOutline, type Outline } from './outline';
import type { Recording } from './recording';

const block = 65536;

/** Samples of all channels together that a block has at most, so that recordings of many channels need no more memory. */
const mostSamples = 1 << 21;

/** Sees a block of every channel, whose arrays are used again; `from` is the number of its first sample. */
export type BlockVisitor = (channels: readonly Float64Array[], from: number) => void;

/** What has been seen of one channel. */
interface Tally {
  moments: RunningMoments;
  min: number;
  max: number;
  whole: boolean;
  notFinite: { count: number; first: number } | null;
  outline: Outline;
}

export interface MeasuredLevels {
  /** One entry a channel. */
  levels: Levels[];
  outlines: Outline[];
}

/**
 * Levels and outlines of every channel in one pass by blocks. Mean and rms keep about 14 digits whatever the offset and the length.
 * A channel without finite samples has levels of 0.
 * @param visitors whatever else is to be done in the same pass
 */
export async function measureLevels(
  recording: Recording,
  pace: Pace,
  visitors: readonly BlockVisitor[] = [],
): Promise<MeasuredLevels> {
  const channels = recording.channels.map((_, c) => c);
  const tallies = channels.map(() => newTally(recording.samples));
  const run = tallies[0]?.outline.step ?? 1;
  // Whole runs of the outlines, so that none is cut by the end of a block.
  const step = Math.max(run, run * Math.floor(Math.min(block, mostSamples / channels.length) / run));
  // Every block in the same memory, which is dearer to get than to fill.
  const memory = channels.map(() => new Float64Array(Math.min(step, recording.samples)));
  for (let from = 0; from < recording.samples; from += step) {
    const planes = await recording.read(channels, from, Math.min(recording.samples, from + step), memory);
    planes.forEach((samples, c) => {
      addBlock(tallies[c], samples, from);
    });
    for (const visit of visitors) visit(planes, from);
    await pace.step('levels', from, recording.samples);
  }
  return { levels: tallies.map(finish), outlines: tallies.map(({ outline }) => outline) };
}

function newTally(samples: number): Tally {
  return {
    moments: newRunningMoments(),
    min: Number.POSITIVE_INFINITY,
    max: Number.NEGATIVE_INFINITY,
    whole: true,
    notFinite: null,
    outline: newOutline(samples),
  };
}

function addBlock(tally: Tally, samples: Float64Array, from: number): void {
  const finite = tally.moments.add(samples);
  const { step } = tally.outline;
  for (let start = 0; start < samples.length; start += step) {
    const end = Math.min(samples.length, start + step);
    if (!finite) noteNotFinite(tally, samples, start, end, from);
    addRun(tally, samples, start, end, from);
  }
}

function noteNotFinite(tally: Tally, samples: Float64Array, start: number, end: number, from: number): void {
  for (let k = start; k < end; k++) {
    const value = samples[k];
    if (value - value === 0) continue;
    if (tally.notFinite === null) tally.notFinite = { count: 0, first: from + k };
    tally.notFinite.count++;
  }
}

/** One run of the outline; `start` and `end` are its places in the block that begins at sample `from`. */
function addRun(tally: Tally, samples: Float64Array, start: number, end: number, from: number): void {
  const { step, low, high } = tally.outline;
  let min = Number.POSITIVE_INFINITY;
  let max = Number.NEGATIVE_INFINITY;
  for (let k = start; k < end; k++) {
    const value = samples[k];
    // Both are false for NaN.
    if (value < min && value !== Number.NEGATIVE_INFINITY) min = value;
    if (value > max && value !== Number.POSITIVE_INFINITY) max = value;
  }
  if (tally.whole) tally.whole = areWhole(samples, start, end);
  if (min < tally.min) tally.min = min;
  if (max > tally.max) tally.max = max;
  const run = (from + start) / step;
  low[run] = min;
  high[run] = max;
}

/** Whether every finite sample is a whole number. */
function areWhole(samples: Float64Array, start: number, end: number): boolean {
  for (let k = start; k < end; k++) {
    const value = samples[k];
    if (Math.floor(value) !== value && value - value === 0) return false;
  }
  return true;
}

function finish({ moments, min, max, whole, notFinite }: Tally): Levels {
  const { count, mean, squares } = moments;
  if (count === 0) return { min: 0, max: 0, mean: 0, rms: 0, whole: false, notFinite };
  return { min, max, mean, rms: Math.sqrt(squares / count + mean * mean), whole, notFinite };
}

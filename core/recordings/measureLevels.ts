import type { Pace } from '../pace';
import { newRunningMoments, type RunningMoments } from '../statistics/runningMoments';
import type { Levels } from './levels';
import type { Recording } from './recording';

const block = 65536;

/** Samples of all channels together that a block has at most, so that recordings of many channels need no more memory. */
const mostSamples = 1 << 21;

/** Sees a block of every channel; `from` is the number of its first sample. */
export type BlockVisitor = (channels: readonly Float64Array[], from: number) => void;

/** What has been seen of one channel. */
interface Tally {
  moments: RunningMoments;
  min: number;
  max: number;
  whole: boolean;
  notFinite: { count: number; first: number } | null;
}

/**
 * Levels of every channel in one pass by blocks. Mean and rms keep about 14 digits whatever the offset and the length.
 * A channel without finite samples has levels of 0.
 * @param visitors whatever else is to be done in the same pass
 */
export async function measureLevels(
  recording: Recording,
  pace: Pace,
  visitors: readonly BlockVisitor[] = [],
): Promise<Levels[]> {
  const channels = recording.channels.map((_, c) => c);
  const tallies = channels.map(newTally);
  const step = Math.min(block, Math.floor(mostSamples / channels.length));
  for (let from = 0; from < recording.samples; from += step) {
    const planes = await recording.read(channels, from, Math.min(recording.samples, from + step));
    planes.forEach((samples, c) => {
      addBlock(tallies[c], samples, from);
    });
    for (const visit of visitors) visit(planes, from);
    await pace.step('levels', from, recording.samples);
  }
  return tallies.map(finish);
}

function newTally(): Tally {
  return {
    moments: newRunningMoments(),
    min: Number.POSITIVE_INFINITY,
    max: Number.NEGATIVE_INFINITY,
    whole: true,
    notFinite: null,
  };
}

function addBlock(tally: Tally, samples: Float64Array, from: number): void {
  tally.moments.add(samples);
  for (let k = 0; k < samples.length; k++) {
    const value = samples[k];
    if (value - value !== 0) {
      if (tally.notFinite === null) tally.notFinite = { count: 0, first: from + k };
      tally.notFinite.count++;
      continue;
    }
    if (value < tally.min) tally.min = value;
    if (value > tally.max) tally.max = value;
    if (tally.whole && Math.floor(value) !== value) tally.whole = false;
  }
}

function finish({ moments, min, max, whole, notFinite }: Tally): Levels {
  const { count, mean, squares } = moments;
  if (count === 0) return { min: 0, max: 0, mean: 0, rms: 0, whole: false, notFinite };
  return { min, max, mean, rms: Math.sqrt(squares / count + mean * mean), whole, notFinite };
}

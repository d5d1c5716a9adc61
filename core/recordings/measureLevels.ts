import type { Pace } from '../pace';
import { newRunningMoments, type RunningMoments } from '../statistics/runningMoments';
import type { Levels } from './levels';
import type { Recording } from './recording';

const block = 65536;

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
 */
export async function measureLevels(recording: Recording, pace: Pace): Promise<Levels[]> {
  const channels = recording.channels.map((_, c) => c);
  const tallies = channels.map(newTally);
  for (let from = 0; from < recording.samples; from += block) {
    const planes = await recording.read(channels, from, Math.min(recording.samples, from + block));
    planes.forEach((samples, c) => {
      addBlock(tallies[c], samples, from);
    });
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

import type { Pace } from '../pace';
import type { Recording } from '../recordings/recording';
import { newWelch, welchSegment } from '../spectra/welch';
import { spreadOver } from '../suitability/pair/gatherSpectra';

/** Power spectral densities of the channels of a recording, in unit²/Hz. */
export interface RecordingSpectrum {
  /** Hz; cycles a sample where the rate is not known. */
  frequencies: Float64Array;
  /** Channels looked at, from the first. */
  densities: Float64Array[];
}

/** Channels at most: more lines are not told apart. */
const mostChannels = 8;

/** Samples of each channel at most, spread over the recording: a spectrum of them takes about a second. */
const mostSamples = 1 << 22;

/** Of the spectrum, where there are samples enough. */
const longestSegment = 4096;

const block = 65536;

/** Means are left in. Blocks with a sample that is no number are left out; null where no segment could be averaged. */
export async function recordingSpectrum(recording: Recording, pace: Pace): Promise<RecordingSpectrum | null> {
  const channels = recording.channels.map((_, c) => c).slice(0, mostChannels);
  const rate = recording.sampleRate ?? 1;
  const segment = welchSegment(recording.samples, longestSegment);
  const welch = newWelch(channels.length, segment, rate);
  for (const { from, to } of spreadOver([{ from: 0, to: recording.samples }], mostSamples)) {
    welch.gap();
    for (let start = from; start < to; start += block) {
      const planes = await recording.read(channels, start, Math.min(to, start + block));
      if (planes.every((plane) => plane.every(Number.isFinite))) welch.push(planes);
      else welch.gap();
      await pace.step('spectra', start - from, to - from);
    }
  }
  if (welch.averages === 0) return null;
  const densities = welch.densities();
  return { frequencies: densities[0].map((_, f) => (f * rate) / segment), densities };
}

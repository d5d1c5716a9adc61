import { refuse } from '../findings/finding';
import { channelLabel, type Recording } from '../recordings/recording';
import type { Interval } from './intervals';
import type { Take, Track } from './take';

/** Constants taken off before the fit, in the recordings' units: one for each input and one for the desired signal. */
export interface Means {
  inputs: number[];
  desired: number;
}

/** Means that take nothing off. */
export function noMeans(inputs: number): Means {
  return { inputs: new Array(inputs).fill(0), desired: 0 };
}

/** Samples of a take over a run of n. */
export interface Signals {
  /** One row an input: x_r[n]. */
  inputs: Float64Array[];
  /** d[n-Δ]. */
  desired: Float64Array;
}

/**
 * Reads a take by runs of n: the desired signal over `[from, to)`, the inputs from `history` samples before.
 * What lies outside the recording or outside `support` is zero.
 */
export type SignalReader = (from: number, to: number, history?: number) => Promise<Signals>;

export interface ReaderOptions {
  means: Means;
  /** Δ in samples. */
  delay: number;
  /** Where given, samples of every signal outside this interval (of its own index) are zero. */
  support?: Interval | undefined;
  /** The arrays of one reading are used again by the next, so that long passes need no more memory. */
  reuse?: boolean;
}

/**
 * A reader of x_r[n] and d[n-Δ], means taken off.
 * @throws Refusal `not-finite` at the first sample that is NaN or infinite
 */
export function signalReader(take: Take, options: ReaderOptions): SignalReader {
  const { means, delay, support } = options;
  const inputPool = options.reuse ? newPool() : undefined;
  const desiredPool = options.reuse ? newPool() : undefined;
  return async (from, to, history = 0) => {
    const inputs = await readTracks(take.inputs, from - history, to, support, inputPool);
    const [desired] = await readTracks([take.desired], from - delay, to - delay, support, desiredPool);
    inputs.forEach(({ samples }, r) => {
      subtractMean(samples, means.inputs[r]);
    });
    subtractMean(desired.samples, means.desired);
    return { inputs: inputs.map(padded), desired: padded(desired) };
  };
}

/** Arrays by the number of the track, made longer where they have to be. */
type Pool = (track: number, length: number) => Float64Array;

function newPool(): Pool {
  const arrays: Float64Array[] = [];
  return (track, length) => {
    if ((arrays[track]?.length ?? -1) < length) arrays[track] = new Float64Array(length);
    return arrays[track];
  };
}

/** The stretch of a track that could be read, and where it stands in the run asked for. */
interface Stretch {
  samples: Float64Array;
  offset: number;
  length: number;
}

async function readTracks(
  tracks: readonly Track[],
  from: number,
  to: number,
  support: Interval | undefined,
  pool?: Pool,
): Promise<Stretch[]> {
  const stretches: Stretch[] = new Array(tracks.length);
  const byRecording = new Map<Recording, number[]>();
  tracks.forEach((track, i) => {
    byRecording.set(track.recording, [...(byRecording.get(track.recording) ?? []), i]);
  });
  for (const [recording, members] of byRecording) {
    const start = Math.min(Math.max(from, support?.from ?? 0, 0), to);
    const end = Math.max(start, Math.min(to, support?.to ?? to, recording.samples));
    const channels = members.map((i) => tracks[i].channel);
    const planes =
      end > start
        ? await recording.read(channels, start, end, pool && members.map((i) => pool(i, end - start)))
        : channels.map(() => new Float64Array(0));
    members.forEach((i, m) => {
      checkFinite(planes[m], tracks[i], start);
      stretches[i] = { samples: planes[m], offset: start - from, length: to - from };
    });
  }
  return stretches;
}

function checkFinite(samples: Float64Array, track: Track, start: number): void {
  for (let k = 0; k < samples.length; k++) {
    if (!Number.isFinite(samples[k])) {
      refuse(
        'not-finite-used',
        { value: String(samples[k]), sample: start + k },
        {
          file: track.recording.file,
          channel: channelLabel(track.recording, track.channel),
          from: start + k,
          to: start + k + 1,
        },
      );
    }
  }
}

/** Takes a mean off, in place. */
export function subtractMean(samples: Float64Array, mean: number): void {
  if (mean === 0) return;
  for (let k = 0; k < samples.length; k++) samples[k] -= mean;
}

function padded({ samples, offset, length }: Stretch): Float64Array {
  if (samples.length === length) return samples;
  const whole = new Float64Array(length);
  if (samples.length > 0) whole.set(samples, offset);
  return whole;
}

import type { Finding, Place } from '../../findings/finding';
import type { Levels } from '../../recordings/levels';

/** What is known of a channel when its checks say what they found. */
export interface ChannelFacts {
  levels: Levels;
  /** Samples of the channel. */
  samples: number;
  /** Fixed-point audio with amplitudes of -1..1. */
  pcm: boolean;
  /** Hz, or null where it is not known. */
  sampleRate: number | null;
  /** File and channel, for findings. */
  place: Place;
}

/** A check of one channel: sees every sample once, block by block. */
export interface ChannelCheck {
  /** The next samples; `from` is the number of the first. They belong to the caller: nothing may keep or change them. */
  add(samples: Float64Array, from: number): void;
  /** Called once, after the last block. */
  findings(facts: ChannelFacts): Finding[];
}

/** A check that looks at all channels of a recording together. */
export interface RecordingCheck {
  /** The same range of samples of every channel checked. */
  add(channels: readonly Float64Array[], from: number): void;
  /** Called once, after the last block, with one entry a channel. */
  findings(facts: readonly ChannelFacts[]): Finding[];
}

const shownFirst = 5;

/** The first few of the positions kept, in words: `samples 100, 2040 and 3999`, and whether there are more. */
export function positionsInWords(firsts: readonly number[], count: number): string {
  const shown = firsts.slice(0, shownFirst);
  const more = count > shown.length ? ', …' : '';
  if (shown.length === 1) return `sample ${shown[0]}${more}`;
  const last = more === '' ? ` and ${shown[shown.length - 1]}` : `, ${shown[shown.length - 1]}`;
  return `samples ${shown.slice(0, -1).join(', ')}${last}${more}`;
}

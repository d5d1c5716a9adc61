import type { Finding } from '../findings/finding';

/** A recording that has been opened: what its header says, and its samples by range. */
export interface Recording {
  /** As the document or the command line names it. */
  readonly file: string;
  /** In words, for example `WAV, PCM 16 bit` or `text, 3 columns separated by ;`. */
  readonly format: string;
  /** True for fixed-point audio (PCM, A-law, µ-law), whose amplitudes are -1..1 of full scale. */
  readonly pcm: boolean;
  /** Bits of a sample of PCM; left out where the steps are not even (A-law, µ-law) and for all other numbers. */
  readonly bits?: number;
  /** Text whose line ends do not matter for its digest (8-bit text); false for binary and UTF-16 files. */
  readonly lineEndsIgnored: boolean;
  /** Samples a second, or null where the file does not say. */
  readonly sampleRate: number | null;
  /** Samples of each channel. */
  readonly samples: number;
  /** Names of the channels as the file gives them; null where it gives none. A time column is no channel. */
  readonly channels: readonly (string | null)[];
  /**
   * Samples `[from, to)` of the channels asked for (numbers from 0), one array each, in the file's own unit.
   * The range must lie inside the recording.
   * @param into memory for them, of that length or longer, one array a channel, so that long passes need no more of it;
   *   where it is left out the arrays are new
   */
  read(
    channels: readonly number[],
    from: number,
    to: number,
    into?: readonly Float64Array[],
  ): Promise<Float64Array[]>;
}

/** What opening a file yields: a recording or, where a finding is a blocker, null. */
export interface Opened {
  recording: Recording | null;
  findings: Finding[];
}

/** How a document names a channel: by its name where that tells it apart, otherwise by its number from 1. */
export function channelEntry({ channels }: Recording, channel: number): string | number {
  const name = channels[channel];
  const unique = name !== null && channels.indexOf(name) === channels.lastIndexOf(name);
  return unique ? name : channel + 1;
}

/** The name a channel is shown and found by: its own, or its number from 1. */
export function channelLabel(recording: Recording, channel: number): string {
  return recording.channels[channel] ?? String(channel + 1);
}

import type { Recording } from '../recordings/recording';
import type { Interval } from './intervals';

/** One channel of an opened recording. */
export interface Track {
  recording: Recording;
  /** From 0. */
  channel: number;
}

/** A take with its recordings opened and its intervals in whole samples, sorted and free of overlaps. */
export interface Take {
  name: string;
  inputs: Track[];
  desired: Track;
  fit: Interval[];
  heldOut: Interval[];
  disturbanceOnly: Interval[];
}

/** Samples that every input of the take has. */
export function inputSamples(take: Take): number {
  return Math.min(...take.inputs.map((track) => track.recording.samples));
}

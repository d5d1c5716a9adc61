import type { Take, Track } from '../pair/take';
import { channelLabel } from '../recordings/recording';
import type { RecordingSummary, TakeSummary } from './designResult';
import type { Pairing } from './pairing';

/** The recordings of a pairing, in the order the document names them. */
export function recordingSummaries({ recordings }: Pairing): RecordingSummary[] {
  return [...recordings].map(([file, { recording, sha256, levels }]) => ({
    file,
    format: recording.format,
    sha256,
    samples: recording.samples,
    sampleRate: recording.sampleRate,
    channels: recording.channels.map((_, c) => channelLabel(recording, c)),
    levels,
  }));
}

export function takeSummaries(takes: readonly Take[]): TakeSummary[] {
  return takes.map((take) => ({
    name: take.name,
    samples: Math.min(...[...take.inputs, take.desired].map((track) => track.recording.samples)),
    inputs: take.inputs.map(trackSummary),
    desired: trackSummary(take.desired),
    fit: take.fit,
    heldOut: take.heldOut,
    disturbanceOnly: take.disturbanceOnly,
  }));
}

function trackSummary({ recording, channel }: Track): { file: string; channel: string } {
  return { file: recording.file, channel: channelLabel(recording, channel) };
}

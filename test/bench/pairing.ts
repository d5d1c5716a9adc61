import { type Interval, intersect } from '../../core/pair/intervals';

/** The keys of a sample pairing document that the generator goes by. */
export interface PairingText {
  job: string;
  sampleRate?: number;
  takes: {
    name: string;
    inputs: { file: string; channel: string | number }[];
    desired: { file: string; channel: string | number };
    fit: Interval | Interval[];
    heldOut: Interval | Interval[];
    disturbanceOnly?: Interval | Interval[];
  }[];
  filter: { length: number; delay: number };
  limits: { heldOutNmse: number; quantisationLoss: number };
}

/** A take as it stands in the recordings, with the document's intervals in samples. */
export interface RecordedTake {
  name: string;
  inputs: Float64Array[];
  desired: Float64Array;
  fit: Interval[];
  /** Where figures are taken: the held-out intervals, for `cancel` only while the disturbance is alone. */
  judged: Interval[];
}

/** Finds a channel of a file by the name or number that the document gives it. */
export type ChannelOf = (file: string, channel: string | number) => Float64Array;

export function recordedTakes(
  pairing: PairingText,
  sampleRate: number,
  channelOf: ChannelOf,
): RecordedTake[] {
  const samples = (given: Interval | Interval[]) =>
    [given].flat().map(({ from, to }) => ({
      from: Math.floor(from * sampleRate + 0.5),
      to: Math.floor(to * sampleRate + 0.5),
    }));
  return pairing.takes.map(({ name, inputs, desired, fit, heldOut, disturbanceOnly }) => ({
    name,
    inputs: inputs.map(({ file, channel }) => channelOf(file, channel)),
    desired: channelOf(desired.file, desired.channel),
    fit: samples(fit),
    judged: disturbanceOnly ? intersect(samples(heldOut), samples(disturbanceOnly)) : samples(heldOut),
  }));
}

import { filterStretch } from '../evaluation/filterStretch';
import { readTaps, type TapsFile } from '../files/readTaps';
import { type Finding, finding, Refusal } from '../findings/finding';
import { signalReader } from '../pair/signals';
import { inputSamples, type Take, type Track } from '../pair/take';
import { channelMissing, findChannelByText } from '../recordings/findChannel';
import { openRecording } from '../recordings/openRecording';
import { channelLabel, type Recording } from '../recordings/recording';
import type { Host } from './host';

/** What is wanted of a filter: its output y, or the error d[n-Δ] - y. */
export type Wanted = 'output' | 'error';

export interface ApplyOptions {
  /** Channels of the recording that feed the filter, by name or number from 1; null: those of the taps file. */
  inputs: string[] | null;
  /** Channel of the desired signal; null: that of the taps file. */
  desired: string | null;
  /** Null: the error for `cancel`, where the recording has the desired channel, otherwise the output. */
  wanted: Wanted | null;
}

/** A filter about to be run over a recording. */
export interface Application {
  recording: Recording;
  sampleRate: number;
  wanted: Wanted;
  inputs: string[];
  /** Null where it plays no part. */
  desired: string | null;
  samples: number;
  findings: Finding[];
  /** Filters the whole recording; zeros stand before it. Blocks come in order. */
  run(visit: (samples: Float64Array) => void | Promise<void>): Promise<void>;
}

/**
 * Prepares to filter a recording with written taps, in doubles. The input means are taken off; the desired mean is
 * added to the output, or left in d for the error, as the firmware does it.
 * @param path of the recording from the root
 * @throws Refusal where the taps file, the recording or the channels cannot be used
 */
export async function prepareApplication(
  host: Host,
  tapsText: string,
  tapsFile: string,
  path: string,
  file: string,
  options: ApplyOptions,
): Promise<Application> {
  const taps = readTaps(tapsText, tapsFile);
  const source = await host.open(path);
  if (typeof source === 'string')
    throw new Refusal([finding(source === 'missing' ? 'missing-file' : 'unreadable-file', {}, { file })]);
  const { recording, findings } = await openRecording(source, file, host.pace);
  if (recording === null) throw new Refusal(findings);
  checkRate(recording, taps);
  const inputs = (options.inputs ?? taps.inputs).map((channel) => findTrack(recording, channel));
  if (inputs.length !== taps.inputs.length) {
    throw new Refusal([
      finding('inputs-differ', { got: inputs.length, expected: taps.inputs.length }, { file }),
    ]);
  }
  const wanted =
    options.wanted ??
    (taps.job === 'cancel' && findChannelByText(recording, options.desired ?? taps.desired) !== null
      ? 'error'
      : 'output');
  const desired = wanted === 'error' ? findTrack(recording, options.desired ?? taps.desired) : inputs[0];
  const take: Take = { name: file, inputs, desired, fit: [], heldOut: [], disturbanceOnly: [] };
  const samples = inputSamples(take);
  return {
    recording,
    sampleRate: recording.sampleRate ?? taps.sampleRate,
    wanted,
    inputs: inputs.map((track) => channelLabel(recording, track.channel)),
    desired: wanted === 'error' ? channelLabel(recording, desired.channel) : null,
    samples,
    findings,
    async run(visit) {
      const read = signalReader(take, {
        means: { inputs: taps.means.inputs, desired: 0 },
        delay: taps.delay,
      });
      const { job, means } = taps;
      // For `cancel` the desired mean stays in d; the other jobs add it to y.
      const added = job === 'cancel' ? 0 : means.desired;
      await filterStretch(
        read,
        { from: 0, to: samples },
        taps.coefficients,
        host.pace,
        ({ desired: d, output }) =>
          visit(output.map((y, n) => (wanted === 'error' ? d[n] - (y + added) : y + added))),
      );
    },
  };
}

function checkRate(recording: Recording, taps: TapsFile): void {
  const rate = recording.sampleRate;
  if (rate === null || Math.abs(rate - taps.sampleRate) <= 1e-6 * taps.sampleRate) return;
  throw new Refusal([
    finding(
      'rate-differs',
      { rate, expected: taps.sampleRate, other: 'the taps file' },
      { file: recording.file },
    ),
  ]);
}

function findTrack(recording: Recording, text: string): Track {
  const channel = findChannelByText(recording, text);
  if (channel === null) throw new Refusal([channelMissing(recording, text)]);
  return { recording, channel };
}

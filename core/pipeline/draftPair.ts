import { type Draft, draftDocument } from '../document/draftDocument';
import type { Job, TrackEntry } from '../document/pairingDocument';
import { readDocument } from '../document/readDocument';
import { type Finding, finding, Refusal } from '../findings/finding';
import { channelMissing, findChannelByText } from '../recordings/findChannel';
import { openRecording } from '../recordings/openRecording';
import { channelEntry, channelLabel, type Recording } from '../recordings/recording';
import { failureCodes, type Host } from './host';

/** A file to be paired: its path from the root, and as the new document will name it. */
export interface PairFile {
  path: string;
  file: string;
}

export interface PairRequest {
  input: PairFile;
  desired: PairFile;
  /** By name or number from 1; null: drawn from the files. */
  inputChannels: string[] | null;
  desiredChannel: string | null;
  job: Job | null;
  title: string;
  /** Hz; null where the files carry it. */
  sampleRate: number | null;
  /** Taps; null: 64, or fewer where the recording is short. */
  length: number | null;
}

export interface DraftedPair {
  text: string;
  /** What was chosen, for the user to confirm. */
  inputs: string[];
  desired: string;
  job: Job;
  findings: Finding[];
}

/**
 * Draws a new pairing document from two files, which may be the same one. Where no channel is named: of one file with
 * several channels the last is the desired signal and the first an input; of two files the first channel of each.
 * Where no job is named it is `identify`, or `predict` where input and desired signal are the same channel.
 * @throws Refusal where a file cannot be read or a channel is not there
 */
export async function draftPair(host: Host, request: PairRequest): Promise<DraftedPair> {
  const findings: Finding[] = [];
  const input = await openOne(host, request.input, findings);
  const same = request.input.path === request.desired.path;
  const desired = same ? input : await openOne(host, request.desired, findings);
  const desiredChannel =
    request.desiredChannel === null
      ? same
        ? desired.channels.length - 1
        : 0
      : channelOf(desired, request.desiredChannel);
  const inputChannels = request.inputChannels?.map((channel) => channelOf(input, channel)) ?? [
    same && desiredChannel === 0 && input.channels.length > 1 ? 1 : 0,
  ];
  const rate = commonRate(input, desired, request.sampleRate);
  const samples = Math.min(input.samples, desired.samples);
  const job = request.job ?? (same && inputChannels.includes(desiredChannel) ? 'predict' : 'identify');
  const draft: Draft = {
    title: request.title,
    job,
    inputs: inputChannels.map((channel) => entry(input, request.input.file, channel)),
    desired: entry(desired, request.desired.file, desiredChannel),
    sampleRate: input.sampleRate === null && desired.sampleRate === null ? request.sampleRate : null,
    samples,
    rate,
    length: request.length ?? lengthFor(samples, inputChannels.length),
  };
  const text = draftDocument(draft);
  // A name that no document may hold (a backslash, say) shows only here.
  const refused = readDocument(text).findings.filter((found) => found.severity === 'blocker');
  if (refused.length > 0) throw new Refusal(refused.map(({ path, ...found }) => found));
  return {
    text,
    inputs: inputChannels.map((channel) => channelLabel(input, channel)),
    desired: channelLabel(desired, desiredChannel),
    job,
    findings,
  };
}

async function openOne(host: Host, { path, file }: PairFile, findings: Finding[]): Promise<Recording> {
  const source = await host.open(path);
  if (typeof source === 'string') {
    throw new Refusal([finding(failureCodes[source], {}, { file })]);
  }
  const opened = await openRecording(source, file, host.pace);
  if (opened.recording === null) throw new Refusal(opened.findings);
  findings.push(...opened.findings);
  return opened.recording;
}

function channelOf(recording: Recording, channel: string): number {
  const number = findChannelByText(recording, channel);
  if (number === null) throw new Refusal([channelMissing(recording, channel)]);
  return number;
}

function entry(recording: Recording, file: string, channel: number): TrackEntry {
  return { file, channel: channelEntry(recording, channel) };
}

function commonRate(input: Recording, desired: Recording, given: number | null): number | null {
  const first = input.sampleRate ?? given;
  const second = desired.sampleRate ?? given;
  if (first !== null && second !== null && Math.abs(first - second) > 1e-6 * first) {
    throw new Refusal([
      finding(
        'rate-differs',
        { rate: second, expected: first, other: input.file },
        { file: desired.file },
        'blocker',
      ),
    ]);
  }
  return first ?? second;
}

/** 64 taps, or where the recording is short a power of two with at least 20 fit samples a tap (common practice). */
function lengthFor(samples: number, inputs: number): number {
  let length = 64;
  while (length > 1 && (2 / 3) * samples < 20 * length * inputs) length /= 2;
  return length;
}

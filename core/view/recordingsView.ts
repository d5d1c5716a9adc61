import { powerDecibels } from '../figures/decibels';
import { visible } from '../figures/visible';
import type { Interval } from '../pair/intervals';
import type { Take, Track } from '../pair/take';
import type { OpenedRecording } from '../pipeline/openRecordings';
import type { ReadPairing } from '../pipeline/pairing';
import type { ChannelView, FileView, RecordingsView, TakeView, TrackView } from '../protocol/views';
import type { Levels } from '../recordings/levels';
import { channelEntry, channelLabel, type Recording } from '../recordings/recording';

/** Files with their levels and takes with their intervals, as far as they could be read. */
export function recordingsView({ document, pairing, recordings, takes }: ReadPairing): RecordingsView {
  const rates = [...recordings.values()].map(({ recording }) => recording.sampleRate);
  return {
    sampleRate: pairing?.sampleRate ?? document?.sampleRate ?? rates.find((rate) => rate !== null) ?? null,
    files: [...recordings.values()].map(({ recording, levels }) => fileView(recording, levels)),
    takes: takes.map((take) => takeView(take, recordings)),
  };
}

/** @param levels one entry a channel */
export function fileView(recording: Recording, levels: readonly Levels[]): FileView {
  const { file, format, pcm, samples, sampleRate } = recording;
  const channels = recording.channels.map((_, c) => channelView(recording, c, levels[c]));
  return { file, format: visible(format), pcm, samples, sampleRate, channels };
}

function channelView(recording: Recording, channel: number, levels: Levels | undefined): ChannelView {
  const entry = { label: channelLabel(recording, channel), entry: channelEntry(recording, channel) };
  if (levels === undefined) {
    return { ...entry, min: null, max: null, mean: null, rms: null, peakDb: null, rmsDb: null };
  }
  const { min, max, mean, rms } = levels;
  return {
    ...entry,
    min,
    max,
    mean,
    rms,
    peakDb: amplitudeDb(Math.max(Math.abs(min), Math.abs(max))),
    rmsDb: amplitudeDb(rms),
  };
}

function amplitudeDb(value: number): number | null {
  return value > 0 ? powerDecibels(value * value) : null;
}

function takeView(take: Take, recordings: ReadonlyMap<string, OpenedRecording>): TakeView {
  const tracks = [
    ...take.inputs.map((track, index) => trackView(track, 'input', index, recordings)),
    trackView(take.desired, 'desired', 0, recordings),
  ];
  const samples = Math.min(...[...take.inputs, take.desired].map(({ recording }) => recording.samples));
  const copy = (intervals: readonly Interval[]) => intervals.map(({ from, to }) => ({ from, to }));
  return {
    name: take.name,
    samples,
    tracks,
    fit: copy(take.fit),
    heldOut: copy(take.heldOut),
    disturbanceOnly: copy(take.disturbanceOnly),
  };
}

function trackView(
  { recording, channel }: Track,
  role: TrackView['role'],
  index: number,
  recordings: ReadonlyMap<string, OpenedRecording>,
): TrackView {
  const levels = recordings.get(recording.file)?.levels[channel];
  const label = channelLabel(recording, channel);
  return { role, index, file: recording.file, channel: label, min: levels?.min ?? 0, max: levels?.max ?? 0 };
}

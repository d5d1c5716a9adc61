import { type Finding, worstFirst } from '../../findings/finding';
import type { Pace } from '../../pace';
import type { Levels } from '../../recordings/levels';
import { measureLevels } from '../../recordings/measureLevels';
import type { Outline } from '../../recordings/outline';
import { channelLabel, type Recording } from '../../recordings/recording';
import type { ChannelCheck, ChannelFacts, RecordingCheck } from './check';
import { newFlatness } from './flatness';
import { newIdenticalChannels } from './identicalChannels';
import { newLowLevel } from './lowLevel';
import { newMains } from './mains';
import { checkNotFinite } from './notFinite';
import { checkOffset } from './offset';
import { newResolution } from './resolution';

export interface Survey {
  /** One entry a channel. */
  levels: Levels[];
  outlines: Outline[];
  /** Worst first. */
  findings: Finding[];
}

export interface SurveyOptions {
  /** Channels that the checks look at (numbers from 0); by default all. */
  channels?: readonly number[];
  /** Hz, where the recording does not carry a rate. */
  sampleRate?: number | null;
}

/**
 * Levels of every channel, and whatever speaks against a recording by itself, in one pass by blocks.
 * @throws Refusal `file-changed` where the file became shorter since it was opened
 */
export async function surveyRecording(
  recording: Recording,
  { channels = recording.channels.map((_, c) => c), sampleRate = null }: SurveyOptions,
  pace: Pace,
): Promise<Survey> {
  const rate = recording.sampleRate ?? sampleRate;
  const byChannel = channels.map(() => newChannelChecks(recording, rate));
  const together: RecordingCheck[] = [
    newIdenticalChannels(channels.length),
    newMains(channels.length, recording.samples, rate),
  ];
  const visit = (planes: readonly Float64Array[], from: number) => {
    const looked = channels.map((channel) => planes[channel]);
    looked.forEach((samples, c) => {
      for (const check of byChannel[c]) check.add(samples, from);
    });
    for (const check of together) check.add(looked, from);
  };
  const { levels, outlines } = await measureLevels(recording, pace, channels.length === 0 ? [] : [visit]);
  const facts = channels.map((channel) => factsOf(recording, channel, levels[channel], rate));
  const findings = [
    ...facts.flatMap((of, c) => [
      ...checkNotFinite(of),
      ...byChannel[c].flatMap((check) => check.findings(of)),
      ...checkOffset(of),
    ]),
    ...together.flatMap((check) => check.findings(facts)),
  ];
  return { levels, outlines, findings: worstFirst(findings) };
}

/** In the order in which they see a block: the resolution is known to the others. */
function newChannelChecks({ pcm, bits }: Recording, sampleRate: number | null): ChannelCheck[] {
  const resolution = newResolution(pcm, pcm && bits === undefined);
  return [
    { add: (samples) => resolution.add(samples), findings: () => [] },
    newFlatness(resolution, sampleRate),
    newLowLevel(pcm, bits ?? null, resolution),
  ];
}

function factsOf(
  recording: Recording,
  channel: number,
  levels: Levels,
  sampleRate: number | null,
): ChannelFacts {
  const place = { file: recording.file, channel: channelLabel(recording, channel) };
  return { levels, samples: recording.samples, pcm: recording.pcm, sampleRate, place };
}

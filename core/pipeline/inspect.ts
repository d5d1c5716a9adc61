import { type Finding, finding, Refusal, worstFirst } from '../findings/finding';
import { openRecording } from '../recordings/openRecording';
import { channelLabel } from '../recordings/recording';
import { surveyRecording } from '../suitability/recording/surveyRecording';
import type { RecordingSummary } from './designResult';
import { failureCodes, type Host } from './host';
import { inspectPair, type PairInspection } from './inspectPair';
import { momentsOf } from './momentsOf';
import { type DocumentPlace, readPairing } from './pairing';
import { recordingSummaries } from './summaries';

/** What the inspection of one recording found. */
export interface InspectedRecording {
  /** Null where a blocker was found. */
  recording: Omit<RecordingSummary, 'sha256'> | null;
  findings: Finding[];
}

/** What the inspection of a pairing found. */
export interface InspectedPairing {
  recordings: RecordingSummary[];
  /** Null where a blocker was found. */
  pair: PairInspection | null;
  findings: Finding[];
}

/** Format, levels and findings of one recording. */
export async function inspectRecording(host: Host, path: string, file: string): Promise<InspectedRecording> {
  const source = await host.open(path);
  if (typeof source === 'string') {
    return { recording: null, findings: [finding(failureCodes[source], {}, { file })] };
  }
  const { recording, findings } = await openRecording(source, file, host.pace);
  if (recording === null) return { recording: null, findings: worstFirst(findings) };
  const survey = await surveyRecording(recording, {}, host.pace);
  return {
    recording: {
      file,
      format: recording.format,
      samples: recording.samples,
      sampleRate: recording.sampleRate,
      channels: recording.channels.map((_, c) => channelLabel(recording, c)),
      levels: survey.levels,
    },
    findings: worstFirst([...findings, ...survey.findings]),
  };
}

/** The same for everything that a pairing document names. */
export async function inspectPairing(
  host: Host,
  text: string,
  place: DocumentPlace,
): Promise<InspectedPairing> {
  const { pairing, findings } = await readPairing(host, text, place);
  if (pairing === null) return { recordings: [], pair: null, findings: worstFirst(findings) };
  const recordings = recordingSummaries(pairing);
  try {
    const { means } = await momentsOf(pairing, host);
    const pair = await inspectPair(pairing, means, findings, host);
    return { recordings, pair, findings: worstFirst([...findings, ...pair.findings]) };
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    return { recordings, pair: null, findings: worstFirst([...findings, ...error.findings]) };
  }
}

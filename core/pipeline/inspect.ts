import { type Finding, finding, Refusal, worstFirst } from '../findings/finding';
import { openRecording } from '../recordings/openRecording';
import { channelLabel } from '../recordings/recording';
import { surveyRecording } from '../suitability/recording/surveyRecording';
import type { RecordingSummary } from './designResult';
import { failureCodes, type Host } from './host';
import { inspectPair, type PairInspection } from './inspectPair';
import { momentsOf } from './momentsOf';
import type { OpenedRecording } from './openRecordings';
import { type DocumentPlace, readPairing } from './pairing';
import { recordingSummaries, takeSummaries } from './summaries';

/** What the inspection of one recording found. */
export interface InspectedRecording {
  /** Null where a blocker was found. */
  recording: Omit<RecordingSummary, 'sha256'> | null;
  /** The same for reading on; null likewise. */
  opened: Omit<OpenedRecording, 'sha256'> | null;
  findings: Finding[];
}

/** What the inspection of a pairing found. */
export interface InspectedPairing {
  recordings: RecordingSummary[];
  /** Of the inputs, then of the desired signal; empty where a blocker was found. */
  labels: string[];
  /** Null where a blocker was found. */
  pair: PairInspection | null;
  findings: Finding[];
}

/** Format, levels and findings of one recording. */
export async function inspectRecording(host: Host, path: string, file: string): Promise<InspectedRecording> {
  const source = await host.open(path);
  if (typeof source === 'string') {
    return { recording: null, opened: null, findings: [finding(failureCodes[source], {}, { file })] };
  }
  const { recording, findings } = await openRecording(source, file, host.pace);
  if (recording === null) return { recording: null, opened: null, findings: worstFirst(findings) };
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
    opened: { recording, levels: survey.levels, outlines: survey.outlines },
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
  if (pairing === null) return { recordings: [], labels: [], pair: null, findings: worstFirst(findings) };
  const recordings = recordingSummaries(pairing);
  const [{ inputs, desired }] = takeSummaries(pairing.takes);
  const labels = [...inputs, desired].map(({ channel }) => channel);
  try {
    const { means } = await momentsOf(pairing, host);
    const pair = await inspectPair(pairing, means, findings, host);
    return { recordings, labels, pair, findings: worstFirst([...findings, ...pair.findings]) };
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    return { recordings, labels, pair: null, findings: worstFirst([...findings, ...error.findings]) };
  }
}

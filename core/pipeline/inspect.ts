import { type Finding, finding, worstFirst } from '../findings/finding';
import { measureLevels } from '../recordings/measureLevels';
import { openRecording } from '../recordings/openRecording';
import { channelLabel } from '../recordings/recording';
import type { RecordingSummary } from './designResult';
import type { Host } from './host';
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
  /** Names of the takes. */
  takes: string[];
  findings: Finding[];
}

/** Format, levels and findings of one recording. */
export async function inspectRecording(host: Host, path: string, file: string): Promise<InspectedRecording> {
  const source = await host.open(path);
  if (typeof source === 'string') {
    const codes = {
      missing: 'missing-file',
      outside: 'outside-root',
      'not-a-file': 'not-a-file',
      unreadable: 'unreadable-file',
    } as const;
    return { recording: null, findings: [finding(codes[source], {}, { file })] };
  }
  const { recording, findings } = await openRecording(source, file, host.pace);
  if (recording === null) return { recording: null, findings: worstFirst(findings) };
  const levels = await measureLevels(recording, host.pace);
  levels.forEach(({ notFinite }, c) => {
    if (notFinite === null) return;
    const { count, first } = notFinite;
    findings.push(
      finding(
        'not-finite',
        { count, first },
        { file, channel: channelLabel(recording, c), from: first },
        'caution',
      ),
    );
  });
  return {
    recording: {
      file,
      format: recording.format,
      samples: recording.samples,
      sampleRate: recording.sampleRate,
      channels: recording.channels.map((_, c) => channelLabel(recording, c)),
      levels,
    },
    findings: worstFirst(findings),
  };
}

/** The same for everything that a pairing document names. */
export async function inspectPairing(
  host: Host,
  text: string,
  place: DocumentPlace,
): Promise<InspectedPairing> {
  const { pairing, findings } = await readPairing(host, text, place);
  return {
    recordings: pairing === null ? [] : recordingSummaries(pairing),
    takes: pairing === null ? [] : pairing.takes.map((take) => take.name),
    findings: worstFirst(findings),
  };
}

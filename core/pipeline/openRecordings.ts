import { digestSource } from '../bytes/digest';
import type { PairingDocument, TrackEntry } from '../document/pairingDocument';
import { resolveInside } from '../document/paths';
import { blocked, type Finding, finding } from '../findings/finding';
import { findChannel } from '../recordings/findChannel';
import type { Levels } from '../recordings/levels';
import { openRecording } from '../recordings/openRecording';
import { channelLabel, type Recording } from '../recordings/recording';
import { surveyRecording } from '../suitability/recording/surveyRecording';
import { failureCodes, type Host } from './host';

/** A recording with all that one reading of it tells. */
export interface OpenedRecording {
  recording: Recording;
  sha256: string;
  /** One entry a channel. */
  levels: Levels[];
}

/** Opens the files that a document names, each once. */
export interface OpenedRecordings {
  /** By the name the document uses. */
  byFile: Map<string, OpenedRecording>;
  findings: Finding[];
}

type Path = readonly (string | number)[];

/** A mention of a channel in the document. */
interface Mention extends TrackEntry {
  /** Keys that lead to it. */
  path: Path;
}

/**
 * Opens, digests and surveys every recording of the document. Problems are findings at the place in the document
 * that names the file, those of a channel where the channel is named first; channels that the document does not name are
 * not looked at.
 * @param folder the document's folder from the root, with forward slashes, '' for the root itself
 */
export async function openRecordings(
  host: Host,
  folder: string,
  document: PairingDocument,
): Promise<OpenedRecordings> {
  const byFile = new Map<string, OpenedRecording>();
  const findings: Finding[] = [];
  for (const [file, mentions] of mentionsIn(document)) {
    const opened = await openOne(host, folder, file, mentions, document);
    if ('code' in opened) {
      findings.push(opened);
      continue;
    }
    findings.push(...opened.findings);
    if (opened.recording !== null) byFile.set(file, { ...opened, recording: opened.recording });
  }
  return { byFile, findings };
}

/** Each file named, with the mentions of its channels. */
function mentionsIn({ takes }: PairingDocument): Map<string, Mention[]> {
  const files = new Map<string, Mention[]>();
  const add = (track: TrackEntry, path: Path) => {
    files.set(track.file, [...(files.get(track.file) ?? []), { ...track, path }]);
  };
  takes.forEach((take, t) => {
    take.inputs.forEach((track, i) => {
      add(track, ['takes', t, 'inputs', i]);
    });
    add(take.desired, ['takes', t, 'desired']);
  });
  return files;
}

interface OpenedOne {
  recording: Recording | null;
  sha256: string;
  levels: Levels[];
  findings: Finding[];
}

async function openOne(
  host: Host,
  folder: string,
  file: string,
  mentions: readonly Mention[],
  document: PairingDocument,
): Promise<Finding | OpenedOne> {
  const path = [...mentions[0].path, 'file'];
  const place = { file, path };
  const resolved = resolveInside(folder, file);
  if (resolved === null) return finding('outside-root', {}, place);
  const source = await host.open(resolved);
  if (typeof source === 'string') return finding(failureCodes[source], {}, place);
  const opened = await openRecording(source, file, host.pace);
  const findings = opened.findings.map((found) => ({ ...found, path }));
  const { recording } = opened;
  if (recording === null || blocked(findings)) return { recording: null, sha256: '', levels: [], findings };
  const sha256 = await digestSource(source, host.newSha256, recording.lineEndsIgnored, host.pace);
  const survey = await surveyMentioned(host, recording, mentions, document);
  return { recording, sha256, levels: survey.levels, findings: [...findings, ...survey.findings] };
}

/** Surveys the channels that are named. Where the document has means taken off, an offset is dealt with. */
async function surveyMentioned(
  host: Host,
  recording: Recording,
  mentions: readonly Mention[],
  { sampleRate, prepare }: PairingDocument,
): Promise<{ levels: Levels[]; findings: Finding[] }> {
  const paths = new Map<number, Path>();
  for (const { channel, path } of mentions) {
    const number = findChannel(recording, channel);
    if (number !== null && !paths.has(number)) paths.set(number, [...path, 'channel']);
  }
  const channels = [...paths.keys()].sort((a, b) => a - b);
  const { levels, findings } = await surveyRecording(recording, { channels, sampleRate }, host.pace);
  const labels = new Map([...paths].map(([number, path]) => [channelLabel(recording, number), path]));
  return {
    levels,
    findings: findings
      .filter(({ code }) => code !== 'offset' || !prepare.removeMean)
      .map((found) => ({ ...found, path: labels.get(found.channel ?? '') ?? mentions[0].path })),
  };
}

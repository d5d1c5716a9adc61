import type { ByteSource } from '../bytes/byteSource';
import { digestSource } from '../bytes/digest';
import type { PairingDocument, TrackEntry } from '../document/pairingDocument';
import { resolveInside } from '../document/paths';
import { blocked, type Finding, finding } from '../findings/finding';
import { findChannel } from '../recordings/findChannel';
import type { Levels } from '../recordings/levels';
import { openRecording } from '../recordings/openRecording';
import type { Outline } from '../recordings/outline';
import { channelLabel, type Opened, type Recording } from '../recordings/recording';
import { type Survey, surveyRecording } from '../suitability/recording/surveyRecording';
import { failureCodes, type Host } from './host';

/** A recording with all that one reading of it tells. */
export interface OpenedRecording {
  recording: Recording;
  sha256: string;
  /** One entry a channel. */
  levels: Levels[];
  outlines: Outline[];
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
export function mentionsIn({ takes }: PairingDocument): Map<string, Mention[]> {
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

type OpenedOne = Omit<OpenedRecording, 'recording'> & Opened;

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
  const { recording, sha256, findings: found } = await openFile(host, source, resolved, file);
  const findings = found.map((one) => ({ ...one, path }));
  if (recording === null) return { recording, sha256, levels: [], outlines: [], findings };
  const keptBy = source.stamp === undefined ? null : [resolved, file, source.stamp];
  const survey = await surveyMentioned(host, recording, keptBy, mentions, document);
  return { recording, sha256, ...survey, findings: [...findings, ...survey.findings] };
}

/** Reads a file's header and its digest, once while its stamp stands. */
function openFile(
  { pace, newSha256, keep }: Host,
  source: ByteSource,
  path: string,
  file: string,
): Promise<Opened & { sha256: string }> {
  const open = async () => {
    const { recording, findings } = await openRecording(source, file, pace);
    if (recording === null || blocked(findings)) return { recording: null, findings, sha256: '' };
    const sha256 = await digestSource(source, newSha256, recording.lineEndsIgnored, pace);
    return { recording, findings, sha256 };
  };
  return source.stamp === undefined ? open() : keep('opened', [path, file, source.stamp], open);
}

/** Surveys the channels that are named. Where the document has means taken off, an offset is dealt with. */
async function surveyMentioned(
  { pace, keep }: Host,
  recording: Recording,
  keptBy: unknown,
  mentions: readonly Mention[],
  { sampleRate, prepare }: PairingDocument,
): Promise<Survey> {
  const paths = new Map<number, Path>();
  for (const { channel, path } of mentions) {
    const number = findChannel(recording, channel);
    if (number !== null && !paths.has(number)) paths.set(number, [...path, 'channel']);
  }
  const channels = [...paths.keys()].sort((a, b) => a - b);
  const survey = () => surveyRecording(recording, { channels, sampleRate }, pace);
  const key = [keptBy, channels, sampleRate];
  const { findings, ...measured } = await (keptBy === null ? survey() : keep('survey', key, survey));
  const labels = new Map([...paths].map(([number, path]) => [channelLabel(recording, number), path]));
  return {
    ...measured,
    findings: findings
      .filter(({ code }) => code !== 'offset' || !prepare.removeMean)
      .map((found) => ({ ...found, path: labels.get(found.channel ?? '') ?? mentions[0].path })),
  };
}

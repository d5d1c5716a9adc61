import { digestSource } from '../bytes/digest';
import type { PairingDocument } from '../document/pairingDocument';
import { resolveInside } from '../document/paths';
import { blocked, type Finding, finding } from '../findings/finding';
import type { Levels } from '../recordings/levels';
import { measureLevels } from '../recordings/measureLevels';
import { openRecording } from '../recordings/openRecording';
import type { Recording } from '../recordings/recording';
import type { Host } from './host';

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

/**
 * Opens, digests and measures every recording of the document. Problems are findings at the place in the document
 * that names the file.
 * @param folder the document's folder from the root, with forward slashes, '' for the root itself
 */
export async function openRecordings(
  host: Host,
  folder: string,
  document: PairingDocument,
): Promise<OpenedRecordings> {
  const byFile = new Map<string, OpenedRecording>();
  const findings: Finding[] = [];
  for (const [file, path] of filesOf(document)) {
    const opened = await openOne(host, folder, file, path);
    if ('code' in opened) {
      findings.push(opened);
      continue;
    }
    findings.push(...opened.findings.map((f) => ({ ...f, path })));
    if (opened.recording !== null) byFile.set(file, { ...opened, recording: opened.recording });
  }
  return { byFile, findings };
}

/** Each file named, with the keys that lead to its first mention. */
function filesOf(document: PairingDocument): Map<string, (string | number)[]> {
  const files = new Map<string, (string | number)[]>();
  document.takes.forEach((take, t) => {
    take.inputs.forEach(({ file }, i) => {
      if (!files.has(file)) files.set(file, ['takes', t, 'inputs', i, 'file']);
    });
    const { file } = take.desired;
    if (!files.has(file)) files.set(file, ['takes', t, 'desired', 'file']);
  });
  return files;
}

async function openOne(
  host: Host,
  folder: string,
  file: string,
  path: readonly (string | number)[],
): Promise<Finding | { recording: Recording | null; sha256: string; levels: Levels[]; findings: Finding[] }> {
  const place = { file, path };
  const resolved = resolveInside(folder, file);
  if (resolved === null) return finding('outside-root', {}, place);
  const source = await host.open(resolved);
  if (source === 'missing') return finding('missing-file', {}, place);
  if (source === 'outside') return finding('outside-root', {}, place);
  if (source === 'not-a-file') return finding('not-a-file', {}, place);
  if (source === 'unreadable') return finding('unreadable-file', {}, place);
  const { recording, findings } = await openRecording(source, file, host.pace);
  if (recording === null || blocked(findings)) return { recording: null, sha256: '', levels: [], findings };
  const sha256 = await digestSource(source, host.newSha256, recording.lineEndsIgnored, host.pace);
  return { recording, sha256, levels: await measureLevels(recording, host.pace), findings };
}

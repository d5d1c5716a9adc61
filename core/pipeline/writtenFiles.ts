import { digestSource } from '../bytes/digest';
import type { PairingDocument } from '../document/pairingDocument';
import { pathIn, resolveInside } from '../document/paths';
import { documentStem } from '../files/documentStem';
import { readTaps, type TapsFile } from '../files/readTaps';
import { selfDigestHolds } from '../files/selfDigest';
import { type Finding, finding, Refusal } from '../findings/finding';
import type { Host } from './host';
import type { DocumentPlace } from './pairing';

/** What was written from a document, as it is now. */
export interface WrittenFiles {
  /** Path of the taps file from the document's folder. */
  file: string;
  /** Null where there is none. */
  taps: TapsFile | null;
  /** Text of the taps file; empty where there is none. */
  text: string;
  /** The other files that the taps file lists, by their paths from the document's folder. */
  others: string[];
  /** Files that are missing or not as they were written. */
  findings: Finding[];
}

/**
 * Reads the taps file and holds the digests it lists against the files beside it.
 * @throws Refusal where a file is there and cannot be read
 */
export async function readWritten(
  host: Host,
  document: PairingDocument,
  place: DocumentPlace,
): Promise<WrittenFiles> {
  const name = `${documentStem(place.file)}.taps.json`;
  const within = (path: string) => pathIn(document.write.folder, path);
  const file = within(name);
  const text = await readText(host, place.folder, file);
  if (text === null) {
    const missing = finding('not-written', { file }, { path: [] });
    return { file, taps: null, text: '', others: [], findings: [missing] };
  }
  const taps = readTaps(text, file);
  const findings: Finding[] = [];
  if (!selfDigestHolds(text, host.newSha256)) findings.push(finding('edited', {}, { file }));
  for (const [path, sha256] of Object.entries(taps.files)) {
    const digest = await digestOf(host, place.folder, within(path));
    if (digest === null) findings.push(finding('missing-output', {}, { file: within(path) }));
    else if (digest !== sha256) findings.push(finding('edited', {}, { file: within(path) }));
  }
  return { file, taps, text, others: Object.keys(taps.files).map(within), findings };
}

/**
 * Whether the taps file was made from this document and these recordings.
 * @param documentSha256 of the document's meaning
 * @param recordings SHA-256 of each recording by the name the document uses
 */
export function staleness(
  documentSha256: string,
  recordings: ReadonlyMap<string, string>,
  taps: TapsFile,
  tapsFile: string,
): Finding[] {
  const findings: Finding[] = [];
  if (taps.document.sha256 !== documentSha256) {
    findings.push(finding('stale-document', {}, { file: tapsFile }));
  }
  const known = new Map(taps.recordings.map(({ file, sha256 }) => [file, sha256]));
  for (const [file, sha256] of recordings) {
    if (known.has(file) && known.get(file) !== sha256)
      findings.push(finding('stale-recording', {}, { file }));
  }
  return findings;
}

async function readText(host: Host, folder: string, file: string): Promise<string | null> {
  const source = await openInside(host, folder, file);
  if (source === null) return null;
  return new TextDecoder().decode(await source.read(0, source.size));
}

async function digestOf(host: Host, folder: string, file: string): Promise<string | null> {
  const source = await openInside(host, folder, file);
  if (source === null) return null;
  // Version control may have changed the line ends of texts; the NPY file has none to change.
  return digestSource(source, host.newSha256, !file.endsWith('.npy'), host.pace);
}

async function openInside(host: Host, folder: string, file: string) {
  const path = resolveInside(folder, file);
  const source = path === null ? 'outside' : await host.open(path);
  if (source === 'missing') return null;
  if (typeof source === 'string') throw new Refusal([finding('unreadable-file', {}, { file })]);
  return source;
}

import type { ByteSource } from '../bytes/byteSource';
import { sha256OfText } from '../bytes/sha256';
import { documentMeaning } from '../document/canonicalJson';
import type { PairingDocument } from '../document/pairingDocument';
import { pathIn, resolveInside } from '../document/paths';
import { readDocument } from '../document/readDocument';
import { blocked, type Finding, finding, Refusal, worstFirst } from '../findings/finding';
import type { FindingCode } from '../findings/sentences';
import { recordingDigest } from '../recordings/recordingDigest';
import { failureCodes, type Host, type OpenFailure } from './host';
import { mentionsIn } from './openRecordings';
import type { DocumentPlace } from './pairing';
import { readWritten, staleness, type WrittenFiles } from './writtenFiles';

/** How a pairing's written files stand. */
export type WrittenWord =
  | 'current'
  | 'recording-changed'
  | 'document-changed'
  | 'edited'
  | 'over-limit'
  | 'not-written'
  | 'bad-input';

/** What digests alone tell of a pairing. All paths are from the root. */
export interface WrittenState {
  state: WrittenWord;
  findings: Finding[];
  /** Limits that the written result exceeds, as its taps file says. */
  overLimit: string[];
  /** Of the document's text, for places in it. */
  text: string;
  /** Start of all generated names; null where the document cannot be read. */
  symbol: string | null;
  tapsFile: string | null;
  /** The other files written. */
  others: string[];
  seen: Seen;
}

/** What a state was made from: as long as every stamp stands, so does the state. */
export interface Seen {
  /** Stamp of each file that was looked at; why there is none where there is none. */
  stamps: Record<string, string>;
  /** SHA-256 of each recording, of that stamp. */
  digests: Record<string, string>;
  /** Bytes of each recording, also of one that is gone, so that it can be found elsewhere. */
  sizes: Record<string, number>;
}

export const nothingSeen: Seen = { stamps: {}, digests: {}, sizes: {} };

/** How the written files of the document at this place stand, by digests alone; recordings that have not changed are not read. */
export async function writtenState(host: Host, place: DocumentPlace, known: Seen): Promise<WrittenState> {
  const seen: Seen = { stamps: {}, digests: {}, sizes: {} };
  const watched: Host = {
    ...host,
    async open(path) {
      const source = await host.open(path);
      seen.stamps[path] = stampOf(source);
      return source;
    },
  };
  const state: WrittenState = {
    state: 'bad-input',
    findings: [],
    overLimit: [],
    text: '',
    symbol: null,
    tapsFile: null,
    others: [],
    seen,
  };
  try {
    const text = await documentText(watched, place);
    state.text = text;
    const { document, findings } = readDocument(text);
    state.findings.push(...findings);
    if (document !== null) await look(watched, document, place, known, state);
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    state.findings.push(...error.findings);
  }
  state.findings = worstFirst(state.findings);
  state.state = wordOf(state);
  return state;
}

/** Whether every file that a state was made from is as it was. */
export async function stillStands(host: Host, { stamps }: Seen): Promise<boolean> {
  const paths = Object.keys(stamps);
  if (paths.length === 0) return false;
  for (const path of paths) {
    if (stamps[path] === '' || stampOf(await host.open(path)) !== stamps[path]) return false;
  }
  return true;
}

/** Empty where changes cannot be told: such a file is looked at each time. */
function stampOf(source: ByteSource | OpenFailure): string {
  return typeof source === 'string' ? source : (source.stamp ?? '');
}

async function documentText(host: Host, { folder, file }: DocumentPlace): Promise<string> {
  const source = await host.open(pathIn(folder, file));
  if (typeof source === 'string') throw new Refusal([finding(failureCodes[source], {}, { file })]);
  return new TextDecoder().decode(await source.read(0, source.size));
}

async function look(
  host: Host,
  document: PairingDocument,
  place: DocumentPlace,
  known: Seen,
  state: WrittenState,
): Promise<void> {
  const inRoot = (path: string) => resolveInside(place.folder, path);
  const recordings = await digests(host, document, place.folder, known, state);
  state.symbol = document.write.symbol;
  const written = await readWritten(host, document, place);
  state.tapsFile = inRoot(written.file);
  state.others = written.others.flatMap((path) => inRoot(path) ?? []);
  state.findings.push(...written.findings);
  if (written.taps === null) return;
  const sha256 = sha256OfText(host.newSha256, documentMeaning(document));
  state.findings.push(...staleness(sha256, recordings, written.taps, written.file));
  state.overLimit = limitsExceeded(written);
}

/** SHA-256 of each recording that can be opened, by the name the document uses. */
async function digests(
  host: Host,
  document: PairingDocument,
  folder: string,
  known: Seen,
  { findings, seen }: WrittenState,
): Promise<Map<string, string>> {
  const byFile = new Map<string, string>();
  for (const [file, mentions] of mentionsIn(document)) {
    const place = { file, path: [...mentions[0].path, 'file'] };
    const path = resolveInside(folder, file);
    const source = path === null ? 'outside' : await host.open(path);
    if (path === null || typeof source === 'string') {
      findings.push(finding(failureCodes[source as OpenFailure], {}, place));
      if (path !== null && known.sizes[path] !== undefined) seen.sizes[path] = known.sizes[path];
      continue;
    }
    const same = known.digests[path] !== undefined && known.stamps[path] === source.stamp;
    const digest = () => recordingDigest(source, host.newSha256, host.pace);
    const { stamp } = source;
    const kept = () => (stamp === undefined ? digest() : host.keep('digest', [path, stamp], digest));
    const sha256 = same ? known.digests[path] : await kept();
    seen.digests[path] = sha256;
    seen.sizes[path] = source.size;
    byFile.set(file, sha256);
  }
  return byFile;
}

function limitsExceeded({ text }: WrittenFiles): string[] {
  const { findings } = JSON.parse(text) as { findings?: unknown };
  if (!Array.isArray(findings)) return [];
  return findings.flatMap((found) =>
    found?.code === 'over-limit' && typeof found.message === 'string' ? [found.message] : [],
  );
}

/** Codes that say how the files stand, what matters most first; any other blocker is bad input. */
const words: readonly (readonly [FindingCode, WrittenWord])[] = [
  ['not-written', 'not-written'],
  ['edited', 'edited'],
  ['stale-recording', 'recording-changed'],
  ['stale-document', 'document-changed'],
  ['missing-output', 'not-written'],
];

function wordOf({ findings, overLimit }: WrittenState): WrittenWord {
  const known = words.map(([code]) => code);
  if (blocked(findings.filter(({ code }) => !known.includes(code)))) return 'bad-input';
  const found = words.find(([code]) => findings.some((one) => one.code === code));
  if (found !== undefined) return found[1];
  return overLimit.length > 0 ? 'over-limit' : 'current';
}

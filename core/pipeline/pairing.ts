import { sha256OfText } from '../bytes/sha256';
import { documentMeaning } from '../document/canonicalJson';
import { describe } from '../document/checks/describe';
import type { PairingDocument } from '../document/pairingDocument';
import { pathFault } from '../document/paths';
import { readDocument } from '../document/readDocument';
import { blocked, type Finding, finding } from '../findings/finding';
import { resolveTakes } from '../pair/resolveTakes';
import type { Take } from '../pair/take';
import type { Host } from './host';
import { type OpenedRecording, openRecordings } from './openRecordings';

/** A pairing document that has been read, with its recordings opened and its takes resolved. */
export interface Pairing {
  document: PairingDocument;
  /** Of the document's meaning. */
  documentSha256: string;
  /** By the name the document uses. */
  recordings: Map<string, OpenedRecording>;
  takes: Take[];
  /** Hz. */
  sampleRate: number;
}

/** Where a document is. */
export interface DocumentPlace {
  /** File name without folder. */
  file: string;
  /** Folder from the root, with forward slashes; '' for the root itself. */
  folder: string;
}

export interface ReadPairing {
  /** Null where a blocker was found. */
  pairing: Pairing | null;
  /** The document as far as it is valid by itself. */
  document: PairingDocument | null;
  /** What could be opened and resolved, also where a blocker was found. */
  recordings: Map<string, OpenedRecording>;
  takes: Take[];
  findings: Finding[];
}

/** Reads, opens and resolves what a document names. */
export async function readPairing(host: Host, text: string, place: DocumentPlace): Promise<ReadPairing> {
  const { document, findings } = readDocument(text);
  findings.push(...nameFindings(place.file));
  if (document === null || blocked(findings)) {
    return { pairing: null, document, recordings: new Map(), takes: [], findings };
  }
  const opened = await openRecordings(host, place.folder, document);
  const recordings = new Map([...opened.byFile].map(([file, { recording }]) => [file, recording]));
  const resolved = resolveTakes(document, recordings);
  const all = [...findings, ...opened.findings, ...resolved.findings];
  const { takes, sampleRate } = resolved;
  const read = { document, recordings: opened.byFile, takes, findings: all };
  if (blocked(all)) return { ...read, pairing: null };
  const documentSha256 = sha256OfText(host.newSha256, documentMeaning(document));
  const pairing = { document, documentSha256, recordings: opened.byFile, takes, sampleRate };
  return { ...read, pairing };
}

/** Written files are named after the document and name each other by paths, which hold no such characters. */
function nameFindings(file: string): Finding[] {
  const fault = pathFault(`./${file}`, 'file');
  if (fault !== 'control' && fault !== 'backslash') return [];
  const code = fault === 'control' ? 'control-character' : 'path-backslash';
  return [finding(code, { key: 'NAME.pairing.json', got: describe(file) }, { path: [] })];
}

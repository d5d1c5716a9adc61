import { open, readFile, stat } from 'node:fs/promises';
import { basename, dirname, join, relative, resolve, sep } from 'node:path';
import { largestDocument } from '../../core/document/parseJson';
import { type Finding, finding } from '../../core/findings/finding';
import type { DocumentPlace } from '../../core/pipeline/pairing';
import { staysInside } from './nodeHost';

/** A document on the local disk and the root that nothing it names may leave. */
export interface Workplace {
  /** Absolute. */
  root: string;
  /** Absolute folder of the document. */
  folder: string;
  place: DocumentPlace;
  text: string;
}

/**
 * Reads a document named on the command line. The root is the one given, otherwise the current folder where that holds
 * the document, otherwise the document's folder.
 */
export async function openWorkplace(
  document: string,
  givenRoot: string | null,
): Promise<Workplace | Finding> {
  const path = resolve(document);
  const folder = dirname(path);
  const place = { file: document };
  let text: string;
  try {
    const about = await stat(path);
    if (!about.isFile()) return finding('not-a-file', {}, place);
    if (await looksLikeRecording(path)) return finding('not-a-document', {}, place);
    if (about.size > largestDocument)
      return finding('document-too-large', { size: about.size, limit: largestDocument }, place);
    text = new TextDecoder().decode(await readFile(path));
  } catch (error) {
    const missing = (error as NodeJS.ErrnoException).code === 'ENOENT';
    return missing ? finding('missing-document', {}, place) : finding('unreadable-file', {}, place);
  }
  const root = rootFor(folder, givenRoot);
  if (!(await staysInside(root, path))) return finding('outside-root', {}, place);
  return {
    root,
    folder,
    place: { file: basename(path), folder: relative(root, folder).split(sep).join('/') },
    text,
  };
}

/** A path from the root as one from the document's folder. */
export function fromFolder({ root, folder }: Workplace, path: string): string {
  return relative(folder, join(root, path)).split(sep).join('/');
}

/** Recordings are named where documents are expected now and then; JSON has neither of their first bytes nor a NUL. */
async function looksLikeRecording(path: string): Promise<boolean> {
  const file = await open(path);
  try {
    const { buffer, bytesRead } = await file.read(Buffer.alloc(64), 0, 64, 0);
    const start = buffer.subarray(0, bytesRead).toString('latin1');
    return start.includes('\0') || start.startsWith('RIFF') || start.startsWith('\x93NUMPY');
  } finally {
    await file.close();
  }
}

/** The given root, otherwise the current folder where it holds the folder, otherwise the folder itself. */
export function rootFor(folder: string, given: string | null): string {
  if (given !== null) return resolve(given);
  const here = process.cwd();
  const below = relative(here, folder);
  return below === '' || (!below.startsWith('..') && resolve(here, below) === folder) ? here : folder;
}

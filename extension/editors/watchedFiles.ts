import type { PairingDocument } from '../../core/document/pairingDocument';
import { resolveInside } from '../../core/document/paths';
import { documentStem } from '../../core/files/documentStem';
import { folderOf, nameOf } from '../files/relativePath';

/** In a folder, from the root: files by name and by how names start. */
export interface WatchedFolder {
  folder: string;
  files: string[];
  starts: string[];
}

/**
 * Where the files lie that make a document's result what it is: its recordings and what was written from it.
 * @param folder of the document, from the root
 * @param file name of the document
 */
export function watchedFiles(document: PairingDocument, folder: string, file: string): WatchedFolder[] {
  const folders = new Map<string, WatchedFolder>();
  const at = (path: string): WatchedFolder => {
    const known = folders.get(path) ?? { folder: path, files: [], starts: [] };
    folders.set(path, known);
    return known;
  };
  const tracks = document.takes.flatMap(({ inputs, desired }) => [...inputs, desired]);
  for (const named of new Set(tracks.map((track) => track.file))) {
    const path = resolveInside(folder, named);
    if (path !== null) at(folderOf(path)).files.push(nameOf(path));
  }
  const written = resolveInside(folder, document.write.folder);
  const stem = documentStem(file);
  if (written !== null) {
    at(written).starts.push(`${stem}.taps.`, `${stem}.note.`, `${document.write.symbol}_`);
    at(written === '' ? `${stem}.note` : `${written}/${stem}.note`).starts.push('');
  }
  return [...folders.values()];
}

import { pathIn } from '../../core/document/paths';
import { fileTypes, type List } from './linkCheck';
import { isRecording } from './recordingNames';

/** How far a search goes: pickers are for folders that an engineer keeps by hand. */
export interface Reach {
  depth: number;
  files: number;
}

/**
 * Recordings below a folder, by their paths from it, nearest folders first. Folders that start with a point and those of
 * package managers are passed over, and so are links.
 */
export async function listRecordings(
  list: List,
  { depth, files }: Reach = { depth: 4, files: 400 },
): Promise<string[]> {
  const found: string[] = [];
  let level = [''];
  for (let i = 0; i <= depth && level.length > 0; i++) {
    const next: string[] = [];
    for (const folder of level) {
      for (const [name, type] of await entriesOf(list, folder)) {
        if (found.length >= files) return found;
        const path = pathIn(folder, name);
        if (type === fileTypes.file && isRecording(name)) found.push(path);
        if (type === fileTypes.folder && !name.startsWith('.') && name !== 'node_modules') next.push(path);
      }
    }
    level = next;
  }
  return found;
}

async function entriesOf(list: List, folder: string): Promise<(readonly [string, number])[]> {
  try {
    return [...(await list(folder))].sort(([a], [b]) => (a < b ? -1 : 1));
  } catch {
    // A folder that may not be read holds nothing to offer.
    return [];
  }
}

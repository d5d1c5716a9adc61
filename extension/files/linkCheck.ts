import { pathIn } from '../../core/document/paths';

/** What the workbench's file systems tell of an entry; the numbers are those of `vscode.FileType`. */
export const fileTypes = { file: 1, folder: 2, link: 64 } as const;

/** Lists a folder by its path from the root: names and types. */
export type List = (folder: string) => PromiseLike<readonly (readonly [string, number])[]>;

/**
 * Whether the way to a path leads over a symbolic link. The workbench's file systems cannot say where a link leads, only
 * that there is one, and a file's own `stat` may follow it without a word: the parent's listing marks it.
 * What is not there is no link. A name that is not listed so may still be found by a file system that takes letters of
 * another case, or accents spelled otherwise, for the same: then a link among those that are alike counts.
 * @param path from the root, with forward slashes
 */
export async function leadsOverLink(list: List, path: string): Promise<boolean> {
  let folder = '';
  for (const name of path.split('/').filter((part) => part !== '')) {
    let entries: Awaited<ReturnType<List>>;
    try {
      entries = await list(folder);
    } catch {
      return false;
    }
    const entry =
      entries.find(([entryName]) => entryName === name) ??
      worst(entries.filter(([entryName]) => folded(entryName) === folded(name)));
    if (entry === undefined) return false;
    if ((entry[1] & fileTypes.link) !== 0) return true;
    folder = pathIn(folder, entry[0]);
  }
  return false;
}

/** A link if there is one. */
function worst<T extends readonly [string, number]>(entries: readonly T[]): T | undefined {
  return entries.find(([, type]) => (type & fileTypes.link) !== 0) ?? entries[0];
}

/** Through upper case, since some letters have two small forms. */
const folded = (name: string) => name.normalize('NFC').toUpperCase().toLowerCase();

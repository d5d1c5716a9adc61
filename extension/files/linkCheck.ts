/** What the workbench's file systems tell of an entry; the numbers are those of `vscode.FileType`. */
export const fileTypes = { file: 1, folder: 2, link: 64 } as const;

/** Lists a folder by its path from the root: names and types. */
export type List = (folder: string) => PromiseLike<readonly (readonly [string, number])[]>;

/**
 * Whether the way to a path leads over a symbolic link. The workbench's file systems cannot say where a link leads, only
 * that there is one, and a file's own `stat` may follow it without a word: the parent's listing marks it.
 * What is not there is no link.
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
    const entry = entries.find(([entryName]) => entryName === name);
    if (entry === undefined) return false;
    if ((entry[1] & fileTypes.link) !== 0) return true;
    folder = folder === '' ? name : `${folder}/${name}`;
  }
  return false;
}

/** The way from a folder to a path, both absolute with forward slashes; '' for the folder itself. */
export function relativePath(folder: string, path: string): string {
  const from = folder.split('/').filter((part) => part !== '');
  const to = path.split('/').filter((part) => part !== '');
  let shared = 0;
  while (shared < from.length && shared < to.length && from[shared] === to[shared]) shared++;
  return [...from.slice(shared).map(() => '..'), ...to.slice(shared)].join('/');
}

/** The same where the path lies in the folder, otherwise null. */
export function pathBelow(folder: string, path: string): string | null {
  const way = relativePath(folder, path);
  return way === '..' || way.startsWith('../') ? null : way;
}

/** `belt.csv` of `recordings/belt.csv`. */
export function nameOf(path: string): string {
  return path.slice(path.lastIndexOf('/') + 1);
}

/** `recordings` of `recordings/belt.csv`, '' of `belt.csv`. */
export function folderOf(path: string): string {
  return path.slice(0, Math.max(0, path.lastIndexOf('/')));
}

/** `belt` of `recordings/belt.csv` and of `belt.pairing.json`. */
export function stemOf(path: string): string {
  return nameOf(path).replace(/(\.pairing\.json|\.[^.]*)$/i, '');
}

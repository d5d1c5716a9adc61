/** Names of the dropped files, without folders: the workbench gives addresses, the desktop files. */
export function droppedFiles(uriList: string, files: readonly { name: string }[]): string[] {
  const named = uriList
    .split(/\r?\n/)
    .filter((line) => line !== '' && !line.startsWith('#'))
    .map((uri) => nameOf(uri));
  return named.length > 0 ? named : files.map(({ name }) => name);
}

function nameOf(uri: string): string {
  const last = uri.replace(/[?#].*$/, '').replace(/^.*\//, '');
  try {
    return decodeURIComponent(last);
  } catch {
    return last;
  }
}

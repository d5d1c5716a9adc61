import { controlCharacters } from './checks/texts';

/** What keeps a text from being a path relative to the document. */
export type PathFault = 'absolute' | 'scheme' | 'backslash' | 'control' | 'folder';

/**
 * Why a path is none that a document may hold, or null. `..` is no fault by itself: see {@link resolveInside}.
 * A first part with a colon is taken for a drive letter or a URI scheme (RFC 3986, 4.2); `./` before it makes it a name.
 * @param kind a file's path must not end as a folder's does
 */
export function pathFault(path: string, kind: 'file' | 'folder'): PathFault | null {
  if (controlCharacters.test(path)) return 'control';
  if (path.startsWith('/') || path.startsWith('\\') || /^[A-Za-z]:/.test(path)) return 'absolute';
  if (/^[A-Za-z][A-Za-z0-9+.-]*:/.test(path)) return 'scheme';
  if (path.includes('\\')) return 'backslash';
  return kind === 'file' && /(^|\/)\.{0,2}$/.test(path) ? 'folder' : null;
}

/** The path of a file in a folder; '' is the root itself. */
export function pathIn(folder: string, file: string): string {
  return folder === '' ? file : `${folder}/${file}`;
}

/**
 * The path from the root of what the document names, without `.`, `..` and doubled slashes; '' for the root itself.
 * Null where it leaves the root on its way, even if it would come back, or is no relative path at all.
 * The spelling alone decides: links are the host's concern.
 * @param documentFolder the document's folder from the root, with forward slashes, '' for the root itself
 * @param path relative to that folder, with forward slashes
 */
export function resolveInside(documentFolder: string, path: string): string | null {
  if (pathFault(path, 'folder') !== null) return null;
  const parts: string[] = [];
  for (const part of [...documentFolder.split('/'), ...path.split('/')]) {
    if (part === '' || part === '.') continue;
    if (part !== '..') parts.push(part);
    else if (parts.pop() === undefined) return null;
  }
  return parts.join('/');
}

import { type PathFault, pathFault } from '../paths';
import type { At, Check } from './check';
import { describe } from './describe';
import { text } from './texts';

/** A path from the document to a file, with forward slashes. Whether it stays inside the root is decided where the root is known. */
export const filePath: Check<string> = (value, at) => relativePath(value, at, 'file');

/** A path from the document to a folder, with forward slashes; `.` is the document's own. */
export const folderPath: Check<string> = (value, at) => relativePath(value, at, 'folder');

const codes = {
  absolute: 'path-absolute',
  scheme: 'path-scheme',
  backslash: 'path-backslash',
  control: 'control-character',
  folder: 'path-names-folder',
} as const satisfies Record<PathFault, string>;

function relativePath(value: unknown, at: At, kind: 'file' | 'folder'): string | undefined {
  const path = text(value, at);
  if (path === undefined) return undefined;
  const fault = pathFault(path, kind);
  return fault === null ? path : at.report(codes[fault], { got: describe(path) });
}

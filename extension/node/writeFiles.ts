import { mkdir, open, readFile, rename, rm, stat } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { readMark } from '../../core/files/generatedMark';
import { type Finding, finding } from '../../core/findings/finding';
import { staysInside } from './nodeHost';

/** A file to be written: its path from the document's folder, with forward slashes, and its bytes. */
export interface NewFile {
  path: string;
  bytes: Uint8Array;
}

export interface Written {
  /** What became of each file, in the order given. */
  files: { path: string; change: 'new' | 'changed' | 'unchanged' }[];
  /** Why nothing was written; empty where all went well. */
  findings: Finding[];
}

/**
 * Writes all files or none: each is written whole beside its target first, then all are renamed in the order given,
 * so that each is old or new and never between. A file that does not carry our mark is never overwritten.
 * Where a rename fails half way the last file, which lists the digests of the others, is still the old one.
 * @param root absolute folder that nothing may leave
 * @param folder absolute folder of the document
 */
export async function writeFiles(root: string, folder: string, files: readonly NewFile[]): Promise<Written> {
  const changes: Written['files'] = [];
  const findings: Finding[] = [];
  for (const { path, bytes } of files) {
    const found = await compare(root, join(folder, path), bytes);
    if (typeof found === 'string') changes.push({ path, change: found });
    else findings.push({ ...found, file: path });
  }
  if (findings.length > 0) return { files: [], findings };

  const waiting: { temporary: string; target: string }[] = [];
  try {
    for (const [i, { path, bytes }] of files.entries()) {
      if (changes[i].change === 'unchanged') continue;
      const target = join(folder, path);
      await mkdir(dirname(target), { recursive: true });
      const temporary = `${target}.${process.pid}.tmp`;
      waiting.push({ temporary, target });
      await writeWhole(temporary, bytes);
    }
    for (const { temporary, target } of waiting) await rename(temporary, target);
  } catch (error) {
    const { code, path } = error as NodeJS.ErrnoException;
    if (code === undefined) throw error;
    return { files: [], findings: [finding('not-writable', { error: code }, { file: path ?? folder })] };
  } finally {
    for (const { temporary } of waiting) await rm(temporary, { force: true });
  }
  return { files: changes, findings: [] };
}

async function compare(
  root: string,
  target: string,
  bytes: Uint8Array,
): Promise<Written['files'][number]['change'] | Finding> {
  if (!(await staysInside(root, target))) return finding('outside-root');
  let existing: Buffer;
  try {
    if (!(await stat(target)).isFile()) return finding('foreign-file');
    existing = await readFile(target);
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    if (code === 'ENOENT') return 'new';
    return finding('not-writable', { error: code ?? 'unreadable' });
  }
  if (existing.equals(bytes)) return 'unchanged';
  return readMark(existing.subarray(0, 4096).toString('latin1')) === null
    ? finding('foreign-file')
    : 'changed';
}

async function writeWhole(path: string, bytes: Uint8Array): Promise<void> {
  const handle = await open(path, 'w');
  try {
    await handle.writeFile(bytes);
    await handle.sync();
  } finally {
    await handle.close();
  }
}

import { fileChange } from '../../core/files/fileChange';
import { type Finding, finding } from '../../core/findings/finding';
import { type Disk, DiskError } from './disk';
import { folderOf } from './relativePath';

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
 */
export async function writeAll(disk: Disk, files: readonly NewFile[]): Promise<Written> {
  const changes: Written['files'] = [];
  const findings: Finding[] = [];
  for (const { path, bytes } of files) {
    const found = await compare(disk, path, bytes);
    if (typeof found === 'string') changes.push({ path, change: found });
    else findings.push({ ...found, file: path });
  }
  if (findings.length > 0) return { files: [], findings };

  const waiting: { temporary: string; target: string }[] = [];
  try {
    for (const [i, { path, bytes }] of files.entries()) {
      if (changes[i].change === 'unchanged') continue;
      await disk.makeFolder(folderOf(path));
      const temporary = await freeBeside(disk, path);
      if (temporary === null) return { files: [], findings: [finding('outside-root', {}, { file: path })] };
      waiting.push({ temporary, target: path });
      await disk.write(temporary, bytes);
    }
    for (const { temporary, target } of waiting) await disk.rename(temporary, target);
  } catch (error) {
    if (!(error instanceof DiskError)) throw error;
    return {
      files: [],
      findings: [finding('not-writable', { error: error.code }, { file: error.path ?? '.' })],
    };
  } finally {
    for (const { temporary } of waiting) await tried(disk.remove(temporary));
  }
  for (const { path } of files) await tried(disk.tidy(path));
  return { files: changes, findings: [] };
}

/** Links that may lie in the place of a file to be written; more are no accident. */
const mostLinks = 100;

/** A path beside the target that no link takes elsewhere, such as one that somebody laid there before. */
async function freeBeside(disk: Disk, path: string): Promise<string | null> {
  for (let i = 0; i <= mostLinks; i++) {
    const temporary = disk.beside(path);
    if (await disk.staysInside(temporary)) return temporary;
  }
  return null;
}

/** What is only tidying must not hide how the writing went. */
async function tried(work: Promise<void>): Promise<void> {
  try {
    await work;
  } catch (error) {
    if (!(error instanceof DiskError)) throw error;
  }
}

async function compare(
  disk: Disk,
  path: string,
  bytes: Uint8Array,
): Promise<Written['files'][number]['change'] | Finding> {
  try {
    if (!(await disk.staysInside(path))) return finding('outside-root');
    const kind = await disk.stat(path);
    if (kind === 'missing') return 'new';
    if (kind === 'other') return finding('foreign-file');
    const change = fileChange(await disk.read(path), bytes);
    return change === 'foreign' ? finding('foreign-file') : change;
  } catch (error) {
    if (!(error instanceof DiskError)) throw error;
    return finding('not-writable', { error: error.code });
  }
}

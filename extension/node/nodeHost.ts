import { createHash } from 'node:crypto';
import { realpath } from 'node:fs/promises';
import { join, sep } from 'node:path';
import type { Sha256 } from '../../core/bytes/sha256';
import type { Pace } from '../../core/pace';
import type { Host } from '../../core/pipeline/host';
import { type Keep, keepNothing } from '../../core/pipeline/keep';
import { type OpenFile, openFile } from './fileSource';

/** A host over a folder of the local disk. */
export interface NodeHost extends Host {
  /** Paths from the root of the open files that were written to since they were opened. */
  changed(): string[];
  /** Closes every file that was opened. */
  close(): Promise<void>;
}

/** SHA-256 by Node's own library. */
export function newSha256(): Sha256 {
  const hash = createHash('sha256');
  return { update: (bytes) => void hash.update(bytes), hex: () => hash.digest('hex') };
}

/**
 * @param root absolute path of the folder that no path may leave, also not through symbolic links
 * @param keep kept stages, for hosts that do the same work again and again
 */
export function newNodeHost(root: string, pace: Pace, keep: Keep = keepNothing): NodeHost {
  const files: { path: string; file: OpenFile }[] = [];
  return {
    newSha256,
    pace,
    keep,
    async open(path) {
      const whole = join(root, path);
      if (!(await staysInside(root, whole))) return 'outside';
      const file = await openFile(whole);
      if (typeof file !== 'string') files.push({ path, file });
      return file;
    },
    changed: () => files.flatMap(({ path, file }) => (file.hasChanged() ? [path] : [])),
    async close() {
      await Promise.all(files.splice(0).map(({ file }) => file.close()));
    },
  };
}

/**
 * Whether the real place of a path, links followed, lies in the real root. What does not exist yet counts by its
 * nearest folder that does.
 */
export async function staysInside(root: string, path: string): Promise<boolean> {
  const realRoot = await realpath(root);
  for (let place = path; ; ) {
    try {
      const real = await realpath(place);
      return real === realRoot || real.startsWith(realRoot.endsWith(sep) ? realRoot : realRoot + sep);
    } catch {
      const parent = join(place, '..');
      if (parent === place) return false;
      place = parent;
    }
  }
}

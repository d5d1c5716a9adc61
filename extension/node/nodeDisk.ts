import { mkdir, open, readFile, rename, rm, stat } from 'node:fs/promises';
import { join, relative, sep } from 'node:path';
import { type Disk, DiskError } from '../files/disk';
import { staysInside } from './nodeHost';

/**
 * The local disk.
 * @param root absolute folder that nothing may leave
 * @param folder absolute folder of the document
 */
export function nodeDisk(root: string, folder: string): Disk {
  const whole = (path: string) => join(folder, path);
  const named = (path: string | undefined) =>
    path === undefined ? null : relative(folder, path).split(sep).join('/');
  const told = async <T>(work: Promise<T>): Promise<T> => {
    try {
      return await work;
    } catch (error) {
      const { code, path } = error as NodeJS.ErrnoException;
      throw code === undefined ? error : new DiskError(code, named(path));
    }
  };
  return {
    staysInside: (path) => staysInside(root, whole(path)),
    async stat(path) {
      try {
        return (await stat(whole(path))).isFile() ? 'file' : 'other';
      } catch (error) {
        if ((error as NodeJS.ErrnoException).code === 'ENOENT') return 'missing';
        return told(Promise.reject(error));
      }
    },
    read: (path) => told(readFile(whole(path))),
    async makeFolder(path) {
      await told(mkdir(whole(path), { recursive: true }));
    },
    beside: (path) => `${path}.${process.pid}.tmp`,
    write: (path, bytes) => told(writeWhole(whole(path), bytes)),
    rename: (from, to) => told(rename(whole(from), whole(to))),
    remove: (path) => rm(whole(path), { force: true }),
  };
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

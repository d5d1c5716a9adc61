import { mkdir, open, readdir, readFile, rename, rm, stat } from 'node:fs/promises';
import { basename, dirname, join, relative, sep } from 'node:path';
import { type Disk, DiskError } from '../files/disk';
import { staysInside } from './nodeHost';

let lastTemporary = 0;

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
    beside: (path) => `${path}.${process.pid}.${++lastTemporary}.tmp`,
    tidy: (path) => told(tidy(whole(path))),
    write: (path, bytes) => told(writeWhole(whole(path), bytes)),
    rename: (from, to) => told(rename(whole(from), whole(to))),
    remove: (path) => told(rm(whole(path), { force: true })),
  };
}

/** Removes what processes that are gone left in the middle of writing a file. */
async function tidy(path: string): Promise<void> {
  const folder = dirname(path);
  for (const name of await readdir(folder)) {
    if (!name.startsWith(`${basename(path)}.`)) continue;
    const [, pid] = /^\.(\d+)\.\d+\.tmp$/.exec(name.slice(basename(path).length)) ?? [];
    if (pid !== undefined && isGone(Number(pid))) await rm(join(folder, name), { force: true });
  }
}

function isGone(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return false;
  } catch (error) {
    // Another user's process may not be asked, but is there.
    return (error as NodeJS.ErrnoException).code === 'ESRCH';
  }
}

async function writeWhole(path: string, bytes: Uint8Array): Promise<void> {
  // Whatever has the name is in nobody's use. A link is removed, not followed.
  await rm(path, { force: true });
  const handle = await open(path, 'wx');
  try {
    await handle.writeFile(bytes);
    await handle.sync();
  } finally {
    await handle.close();
  }
}

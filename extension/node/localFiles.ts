import { stat } from 'node:fs/promises';
import { join } from 'node:path';
import { keptFiles, type RootFiles } from '../worker/rootFiles';
import { openFile } from './fileSource';
import { staysInside } from './nodeHost';

/** Files of the local disk below a folder, read by range. */
export function localFiles(root: string): RootFiles {
  return keptFiles({
    async stamp(path) {
      const whole = join(root, path);
      if (!(await staysInside(root, whole))) return 'outside';
      try {
        const { size, mtimeMs, ctimeMs, ino } = await stat(whole);
        return { stamp: [size, mtimeMs, ctimeMs, ino].join(' ') };
      } catch (error) {
        return (error as NodeJS.ErrnoException).code === 'ENOENT' ? 'missing' : 'unreadable';
      }
    },
    async open(path, stamp) {
      const file = await openFile(join(root, path));
      return typeof file === 'string' ? file : { ...file, stamp };
    },
  });
}

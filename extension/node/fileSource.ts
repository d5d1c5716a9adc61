import { closeSync, fstatSync, openSync, readSync } from 'node:fs';
import { stat } from 'node:fs/promises';
import type { ByteSource } from '../../core/bytes/byteSource';
import type { OpenFailure } from '../../core/pipeline/host';

/** Ranges of a local file. The handle stays open until {@link OpenFile.close}. */
export interface OpenFile extends ByteSource {
  /** Whether the file that is open has been written to since; one that was put in its place is another. */
  hasChanged(): boolean;
  close(): Promise<void>;
}

/** Opens a local file for reading by range, or says why it cannot. */
export async function openFile(path: string): Promise<OpenFile | OpenFailure> {
  try {
    // Looked at before it is opened: opening a pipe that nobody writes to would wait for ever.
    const about = await stat(path);
    if (!about.isFile()) return 'not-a-file';
    return fileSource(openSync(path, 'r'));
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'ENOENT' ? 'missing' : 'unreadable';
  }
}

/** Reads at once, without a thread of the pool between: recordings are read in thousands of small ranges. */
function fileSource(descriptor: number): OpenFile {
  let buffer = new Uint8Array(0);
  const { size, mtimeMs } = fstatSync(descriptor);
  return {
    size,
    async read(offset, length) {
      if (buffer.length < length) buffer = new Uint8Array(length);
      let filled = 0;
      while (filled < length) {
        const count = readSync(descriptor, buffer, filled, length - filled, offset + filled);
        if (count === 0) break;
        filled += count;
      }
      return buffer.subarray(0, filled);
    },
    hasChanged() {
      const now = fstatSync(descriptor);
      return now.size !== size || now.mtimeMs !== mtimeMs;
    },
    close: async () => closeSync(descriptor),
  };
}

import { type FileHandle, open, stat } from 'node:fs/promises';
import type { ByteSource } from '../../core/bytes/byteSource';
import type { OpenFailure } from '../../core/pipeline/host';

/** Ranges of a local file. The handle stays open until {@link OpenFile.close}. */
export interface OpenFile extends ByteSource {
  close(): Promise<void>;
}

/** Opens a local file for reading by range, or says why it cannot. */
export async function openFile(path: string): Promise<OpenFile | OpenFailure> {
  try {
    // Looked at before it is opened: opening a pipe that nobody writes to would wait for ever.
    const about = await stat(path);
    if (!about.isFile()) return 'not-a-file';
    return fileSource(await open(path, 'r'), about.size);
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'ENOENT' ? 'missing' : 'unreadable';
  }
}

function fileSource(handle: FileHandle, size: number): OpenFile {
  let buffer = new Uint8Array(0);
  return {
    size,
    async read(offset, length) {
      if (buffer.length < length) buffer = new Uint8Array(length);
      let filled = 0;
      while (filled < length) {
        const { bytesRead } = await handle.read(buffer, filled, length - filled, offset + filled);
        if (bytesRead === 0) break;
        filled += bytesRead;
      }
      return buffer.subarray(0, filled);
    },
    close: () => handle.close(),
  };
}

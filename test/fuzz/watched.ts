import type { ByteSource } from '../../core/bytes/byteSource';
import type { Pace } from '../../core/pace';
import type { Disk } from './makeInput';

/** Work done on one input, which a reader must keep in proportion to the file. */
export interface Work {
  bytesRead: number;
  reads: number;
  steps: number;
}

export interface Watched {
  source: ByteSource;
  pace: Pace;
  work: Work;
}

/** Reads after which a file that does not stay is another. */
const steadyReads = 3;

/**
 * A source that counts what is read, spoils each array at the next read as the contract allows, and throws where a reader
 * asks for bytes that no file could have; and a pace that counts its steps.
 */
export function watch(bytes: Uint8Array, disk: Disk): Watched {
  const work: Work = { bytesRead: 0, reads: 0, steps: 0 };
  let lent = new Uint8Array(0);
  const source: ByteSource = {
    size: bytes.length,
    async read(offset, length) {
      if (!(offset >= 0 && length >= 0 && offset + length <= bytes.length)) {
        throw new Error(`read of ${length} bytes at ${offset} of a file of ${bytes.length}`);
      }
      if (!Number.isInteger(offset) || !Number.isInteger(length))
        throw new Error(`read at ${offset} of ${length}`);
      lent.fill(0x39);
      lent = bytes.slice(offset, offset + length);
      work.reads++;
      work.bytesRead += length;
      if (disk === 'steady' || work.reads <= steadyReads) return lent;
      if (disk === 'other bytes') return lent.fill(bytes[work.reads % bytes.length]);
      lent = lent.slice(0, length >> 1);
      return lent;
    },
  };
  const pace: Pace = {
    async step() {
      work.steps++;
    },
  };
  return { source, pace, work };
}

import { readTaps, type TapsFile } from '../files/readTaps';
import { Refusal } from '../findings/finding';
import type { DesignResult } from '../pipeline/designResult';
import { type Compared, compareTaps, type DesignChange } from './compareTaps';

export type { DesignChange } from './compareTaps';

/**
 * Compares the taps file that is there with a new result.
 * @param text of the taps file
 * @returns null where the taps are the same, and where the file is none that this version can read or has other inputs
 */
export function compareDesigns(text: string, file: string, result: DesignResult): DesignChange | null {
  const written = readable(text, file);
  return written === null ? null : compareTaps(written, asWritten(result));
}

function asWritten(result: DesignResult): Compared {
  const { document, arithmetic } = result;
  return {
    ...result,
    delay: document.filter.delay,
    document: { file: result.documentFile, sha256: result.documentSha256 },
    heldOutNmseDb: result.heldOut?.nmseDb ?? null,
    arithmetic: { ...arithmetic, word: document.arithmetic.word },
  };
}

function readable(text: string, file: string): TapsFile | null {
  try {
    return readTaps(text, file);
  } catch (error) {
    if (error instanceof Refusal) return null;
    throw error;
  }
}

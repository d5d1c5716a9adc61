import { readTaps, type TapsFile } from '../files/readTaps';
import { Refusal } from '../findings/finding';
import type { DesignResult } from '../pipeline/designResult';
import { type AlignedTaps, alignTaps } from './alignTaps';
import { type ResponseChange, responseChange } from './responseChange';

/** How a new design differs from the one whose files it is about to overwrite. */
export interface DesignChange {
  /** The tap that changes most. `k` counts in the new filter and lies outside it where only the old one had the tap. */
  largest: { input: string; k: number; before: number; after: number };
  /** `‖w_after - w_before‖ / ‖w_before‖` over all taps of all inputs; null where all were zero before. */
  relative: number | null;
  response: ResponseChange;
  /** Number of the target's numbers (integers, or floats) that differ, of so many; null where words or lengths differ. */
  values: { different: number; of: number } | null;
  length: { before: number; after: number };
  delay: { before: number; after: number };
  heldOutNmseDb: { before: number | null; after: number | null };
  /** Of the target's arithmetic. */
  targetNmseDb: { before: number | null; after: number | null };
  /** Whether the document's meaning changed, and recordings that did. */
  documentChanged: boolean;
  recordingsChanged: string[];
}

/**
 * Compares the taps file that is there with a new result, tap by tap where they meet the same sample of the desired
 * signal.
 * @param text of the taps file
 * @returns null where the taps are the same, and where the file is none that this version can read or has other inputs
 */
export function compareDesigns(text: string, file: string, result: DesignResult): DesignChange | null {
  const written = readable(text, file);
  if (written === null || written.coefficients.length !== result.coefficients.length) return null;
  const { delay } = result.document.filter;
  const taps = result.coefficients.map((row, r) =>
    alignTaps(written.coefficients[r], written.delay, row, delay),
  );
  const { largest, changed, size } = tapChanges(taps);
  const values = valueChanges(written, result);
  const sameTaps = changed === 0 && written.delay === delay;
  if (sameTaps && (values === null || values.different === 0)) return null;
  const known = new Map(written.recordings.map(({ file: name, sha256 }) => [name, sha256]));
  return {
    largest: { ...largest, input: result.inputs[largest.input] },
    relative: size > 0 ? Math.sqrt(changed / size) : null,
    response: responseChange(taps, result.sampleRate),
    values,
    length: { before: written.coefficients[0].length, after: result.coefficients[0].length },
    delay: { before: written.delay, after: delay },
    heldOutNmseDb: { before: written.heldOutNmseDb, after: result.heldOut?.nmseDb ?? null },
    targetNmseDb: { before: written.arithmetic.heldOutNmseDb, after: result.arithmetic.heldOutNmseDb },
    documentChanged: written.document.sha256 !== result.documentSha256,
    recordingsChanged: result.recordings
      .filter(({ file: name, sha256 }) => known.get(name) !== sha256)
      .map(({ file: name }) => name),
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

function tapChanges(taps: readonly AlignedTaps[]) {
  let largest = { input: 0, k: 0, before: 0, after: 0 };
  let most = -1;
  let changed = 0;
  let size = 0;
  taps.forEach(({ before, after, first }, input) => {
    for (let i = 0; i < after.length; i++) {
      const gap = Math.abs(after[i] - before[i]);
      changed += gap * gap;
      size += before[i] * before[i];
      if (gap > most) {
        most = gap;
        largest = { input, k: i + first, before: before[i], after: after[i] };
      }
    }
  });
  return { largest, changed, size };
}

function valueChanges({ arithmetic }: TapsFile, result: DesignResult): DesignChange['values'] {
  const { values, fractionBits } = result.arithmetic;
  const { word } = result.document.arithmetic;
  const same =
    arithmetic.word === word &&
    arithmetic.fractionBits === fractionBits &&
    arithmetic.values.length === values.length &&
    arithmetic.values[0].length === values[0].length;
  if (!same) return null;
  const pairs = values.flatMap((row, r) => Array.from(row, (v, k) => v === arithmetic.values[r][k]));
  return { different: pairs.filter((equal) => !equal).length, of: pairs.length };
}

import type { TapsFile } from '../files/readTaps';
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

/** What a comparison needs of either filter. */
export type Compared = Pick<
  TapsFile,
  | 'inputs'
  | 'coefficients'
  | 'delay'
  | 'sampleRate'
  | 'document'
  | 'recordings'
  | 'heldOutNmseDb'
  | 'arithmetic'
>;

/**
 * Compares two filters tap by tap where they meet the same sample of the desired signal.
 * @returns null where the taps are the same, and where the filters have other numbers of inputs
 */
export function compareTaps(before: Compared, after: Compared): DesignChange | null {
  if (before.coefficients.length !== after.coefficients.length) return null;
  const taps = after.coefficients.map((row, r) =>
    alignTaps(before.coefficients[r], before.delay, row, after.delay),
  );
  const { largest, changed, size } = tapChanges(taps);
  const values = valueChanges(before.arithmetic, after.arithmetic);
  const sameTaps = changed === 0 && before.delay === after.delay;
  if (sameTaps && (values === null || values.different === 0)) return null;
  const known = new Map(before.recordings.map(({ file, sha256 }) => [file, sha256]));
  return {
    largest: { ...largest, input: after.inputs[largest.input] },
    relative: size > 0 ? Math.sqrt(changed / size) : null,
    response: responseChange(taps, after.sampleRate),
    values,
    length: { before: before.coefficients[0].length, after: after.coefficients[0].length },
    delay: { before: before.delay, after: after.delay },
    heldOutNmseDb: { before: before.heldOutNmseDb, after: after.heldOutNmseDb },
    targetNmseDb: { before: before.arithmetic.heldOutNmseDb, after: after.arithmetic.heldOutNmseDb },
    documentChanged: before.document.sha256 !== after.document.sha256,
    recordingsChanged: after.recordings
      .filter(({ file, sha256 }) => known.get(file) !== sha256)
      .map(({ file }) => file),
  };
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

type Arithmetic = Compared['arithmetic'];

function valueChanges(before: Arithmetic, after: Arithmetic): DesignChange['values'] {
  const same =
    before.word === after.word &&
    before.fractionBits === after.fractionBits &&
    before.values.length === after.values.length &&
    before.values[0].length === after.values[0].length;
  if (!same) return null;
  const pairs = after.values.flatMap((row, r) => Array.from(row, (v, k) => v === before.values[r][k]));
  return { different: pairs.filter((equal) => !equal).length, of: pairs.length };
}

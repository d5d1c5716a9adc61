import { relativeStandardError } from '../../evaluation/errorTally';
import { decibelsOfE, powerDecibels } from '../../figures/decibels';
import { studentPoint } from './studentPoint';

/** By how much one filter leaves less error than another over the same blocks, none of which either was fitted to. */
export interface Comparison {
  /** Decibels; positive where the first is the better. */
  gainDb: number;
  standardErrorDb: number;
  /** Blocks that were compared. */
  blocks: number;
}

/**
 * @param better Σ e² of the filter that should be better, one number a block
 * @param other of the one it is compared with
 * @returns null for fewer than four blocks or no error at all
 */
export function compareErrors(better: readonly number[], other: readonly number[]): Comparison | null {
  const error = Float64Array.from(better);
  const desired = Float64Array.from(other);
  const relative = relativeStandardError({ error, desired });
  if (relative === null) return null;
  const sum = (row: Float64Array) => row.reduce((a, b) => a + b, 0);
  return {
    gainDb: powerDecibels(sum(desired) / sum(error)),
    // To first order: d(10 log10 r) = (10 / ln 10) dr / r.
    standardErrorDb: decibelsOfE * relative,
    blocks: error.length,
  };
}

/** True where the gain matters and chance exceeds it in one comparison of ten thousand. */
export function proves(comparison: Comparison, leastDb: number): boolean {
  const { gainDb, standardErrorDb, blocks } = comparison;
  return gainDb >= leastDb && gainDb > studentPoint(blocks - 1) * standardErrorDb;
}

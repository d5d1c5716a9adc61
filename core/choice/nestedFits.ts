import type { JointSums, Layout } from './blockSums';
import type { DelayWalk } from './delayWalk';
import { denseFitter } from './denseFits';
import { structuredFitter } from './structuredFits';

/** The fits of one length. */
export interface LengthFits {
  /** Place of the length in the list of lengths. */
  place: number;
  length: number;
  /** One row a delay, tap by tap (k·K + r); the first K·length values. Overwritten by the next length. */
  taps: readonly Float64Array[];
  /** How they were found, where from those of the delay before; null otherwise. Overwritten likewise. */
  walk: DelayWalk | null;
  /** Trace of the inverse of the regularised matrix. */
  inverseTrace: number;
}

/**
 * Fits of all lengths and delays to one set of training samples at one regularisation, all from one factorisation of the
 * longest: a shorter filter's equations are a leading part of it, since unknowns stand tap by tap.
 * Gives those of each length that can be solved in turn.
 * @param lengths rising
 */
export type NestedFitter = (regularisation: number, lengths: readonly number[]) => Iterable<LengthFits>;

/** Unknowns for each pair of columns from which the structured method is the faster, by measurement. */
const unknownsForPair = 24;

/** Unknowns up to which a dense matrix for each fold stays within some 100 MB. */
const mostDense = 1024;

/** The method that suits: one whose time grows with size³, or with size² and the ends of the training stretches. */
export function nestedFitter(sums: JointSums, layout: Layout): NestedFitter {
  const { inputs, length } = layout;
  const pairs = inputs + sums.edges.length + 1;
  const size = inputs * length;
  return size <= mostDense && size < unknownsForPair * pairs
    ? denseFitter(sums, layout)
    : structuredFitter(sums, layout);
}

import type { Order, Symmetry } from '../document/pairingDocument';

/** One input's coefficients, given newest-first, in the order asked for. */
export function orderedRow(newestFirst: Float64Array, order: Order): Float64Array {
  return order === 'newest-first' ? newestFirst : newestFirst.slice().reverse();
}

/** How the written files say which symmetry the taps have. */
export const symmetryNumber: Record<Symmetry, number> = { none: 0, even: 1, odd: -1 };

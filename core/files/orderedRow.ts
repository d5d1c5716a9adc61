import type { Order } from '../document/pairingDocument';

/** One input's coefficients, given newest-first, in the order asked for. */
export function orderedRow(newestFirst: Float64Array, order: Order): Float64Array {
  return order === 'newest-first' ? newestFirst : newestFirst.slice().reverse();
}

import { type Coefficients, errorOver, fitBlocks, leastError, outputEnergy } from './blockFit';
import type { Block } from './blockSums';

/**
 * Errors over each block of a filter fitted to others of the same blocks: they are cut into four runs, and the first
 * and third are judged by what was fitted to the second and fourth, and the other way round. Runs rather than every
 * other block, since slow noise goes on from one block to the next.
 * @returns in the order of the blocks; null where one of the two cannot be fitted
 */
export function crossErrors(blocks: readonly Block[], regularisation: number, skip = 0): number[] | null {
  const fits = halvesOf(blocks).map((half) => fitBlocks(half, regularisation, skip));
  const [first, second] = fits;
  if (first === null || second === null) return null;
  return blocks.map((block, i) => errorOver(block, inFirst(i, blocks.length) ? second : first));
}

/** Blocks of the first and third run, and those of the second and fourth. */
export function halvesOf(blocks: readonly Block[]): [Block[], Block[]] {
  const first = (_: Block, i: number) => inFirst(i, blocks.length);
  return [blocks.filter(first), blocks.filter((block, i) => !first(block, i))];
}

function inFirst(i: number, count: number): boolean {
  return Math.floor((4 * i) / count) % 2 === 0;
}

/** A fit to several groups of blocks together with the fits that leave out one group each. */
export interface JackknifedFit {
  whole: Coefficients;
  without: Coefficients[];
}

/** Null where one of them cannot be fitted. */
export function jackknifedFit(
  groups: readonly (readonly Block[])[],
  solve: (groups: readonly (readonly Block[])[]) => Coefficients | null,
): JackknifedFit | null {
  const whole = solve(groups);
  const without = groups.map((group) => solve(groups.filter((other) => other !== group)));
  if (whole === null || !without.every((w) => w !== null)) return null;
  return { whole, without };
}

/** How often what is expected from a fit's uncertainty is taken off: it is known to a factor of two at best. */
const caution = 4;

/**
 * Σ e² over a block of a filter fitted to other blocks, less what its own uncertainty may add: it may have been fitted
 * where the input said little about what this block asks, or where slow noise went along with the input for a while.
 * The uncertainty is that of the jackknife over the groups (Efron & Stein, Annals of Statistics 9, 1981).
 */
export function surelyWrong(block: Block, { whole, without }: JackknifedFit): number {
  let spread = 0;
  for (const fit of without) {
    const difference = fit.map((row, r) => row.map((value, k) => value - whole[r][k]));
    spread += outputEnergy(block, difference);
  }
  const excess = ((without.length - 1) / without.length) * spread;
  return Math.max(leastError * block.sums.desiredEnergy, errorOver(block, whole) - caution * excess);
}

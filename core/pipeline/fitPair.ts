import type { Filter } from '../evaluation/filter';
import { finding, Refusal } from '../findings/finding';
import type { Pace } from '../pace';
import { type Moments, measureMoments } from '../pair/moments';
import { type NormalSystem, normalSystem } from '../solvers/normalSystem';
import { type Solution, solve, type Unsolvable } from '../solvers/solve';
import { gatherSums } from '../statistics/gatherSums';
import { checkPair, checkSilence } from './checkPair';
import type { Pairing } from './pairing';

/** The minimum-mean-squared-error filter of a pairing and what led to it. */
export interface Fit {
  filter: Filter;
  moments: Moments;
  system: NormalSystem;
  solution: Solution;
}

/**
 * Statistics and solution.
 * @throws Refusal where a blocker is found
 */
export async function fitPair(pairing: Pairing, pace: Pace): Promise<Fit> {
  const { document, takes } = pairing;
  const { length, delay, windowing, regularisation } = document.filter;
  refuseIfAny(checkPair(pairing));
  const moments = await measureMoments(takes, document.prepare.removeMean, pace);
  refuseIfAny(checkSilence(takes, moments));
  const sums = await gatherSums(takes, { length, delay, windowing }, moments.means, pace);
  const system = normalSystem(sums, moments.inputPowers);
  const solution = solve(system, sums.inputs, regularisation);
  if ('smallestRegularisation' in solution) throw new Refusal([unsolvable(solution, regularisation)]);
  return {
    filter: { coefficients: solution.coefficients, delay, means: moments.means },
    moments,
    system,
    solution,
  };
}

function refuseIfAny(findings: Refusal['findings']): void {
  if (findings.length > 0) throw new Refusal(findings);
}

function unsolvable({ order, conditionNumber, smallestRegularisation }: Unsolvable, regularisation: number) {
  const why =
    order !== null
      ? `the matrix is singular to working accuracy from order ${order + 1}`
      : `the condition number is ${Number(conditionNumber?.toPrecision(2))}`;
  return finding(
    'unsolvable',
    { regularisation, why, smallest: smallestRegularisation },
    { path: ['filter', 'regularisation'] },
  );
}

import type { Filter } from '../evaluation/filter';
import { type ErrorFigure, fitFigureFromSums } from '../evaluation/fitFigure';
import { finding, Refusal } from '../findings/finding';
import type { Moments } from '../pair/moments';
import { type GainConditions, gainConditions, holdConditions } from '../solvers/fixedGain';
import { type Fold, foldSystem, newFold, unfold } from '../solvers/fold';
import { type NormalSystem, normalSystem } from '../solvers/normalSystem';
import { quadraticForm } from '../solvers/quadraticForm';
import { type Solution, solve, type Unsolvable } from '../solvers/solve';
import { gatherSums } from '../statistics/gatherSums';
import { bandOf } from './askedBand';
import type { Work } from './host';
import { momentsOf } from './momentsOf';
import type { Pairing } from './pairing';
import { fitKey, sumsKey } from './stageKeys';

/** The minimum-mean-squared-error filter of a pairing and what led to it. */
export interface Fit {
  filter: Filter;
  /** Over the n of the fit, where the statistics tell it well enough. */
  figure: ErrorFigure | null;
  /** The taps that the symmetry leaves free, one row an input; all taps where there is none. */
  free: Float64Array[];
  fold: Fold;
  gain: GainConditions | null;
  moments: Moments;
  /** Of all taps, and of the free ones. */
  whole: NormalSystem;
  system: NormalSystem;
  solution: Solution;
  /** The filter without what the document asks of its shape, for the price: without any of it, without the gain alone. */
  unshaped: { without: 'shape' | 'gain'; filter: Filter }[];
}

/**
 * Statistics and solution.
 * @throws Refusal where a blocker is found
 */
export async function fitPair(pairing: Pairing, work: Work): Promise<Fit> {
  const moments = await momentsOf(pairing, work);
  return work.keep('fit', fitKey(pairing), () => solvePair(pairing, moments, work));
}

async function solvePair(pairing: Pairing, moments: Moments, { pace, keep }: Work): Promise<Fit> {
  const { document, takes } = pairing;
  const { length, delay, windowing, regularisation } = document.filter;
  const band = bandOf(pairing);
  const sums = await keep('sums', sumsKey(pairing), () =>
    gatherSums(takes, { length, delay, windowing, band }, moments.means, pace),
  );
  const whole = normalSystem(sums, moments.inputPowers);
  const fold = newFold(length, document.filter.symmetry);
  const system = foldSystem(whole, sums.inputs, fold);
  const solution = solve(system, sums.inputs, regularisation);
  if ('smallestRegularisation' in solution) throw new Refusal([unsolvable(solution, regularisation)]);
  const gain = askedGain(pairing, fold);
  const free = gain === null ? solution.coefficients : held(pairing, system, solution, gain);
  const filterOf = (taps: readonly Float64Array[]): Filter => ({
    coefficients: unfold(fold, taps),
    delay,
    means: moments.means,
    band,
  });
  const unshaped: Fit['unshaped'] = [];
  if (gain !== null) unshaped.push({ without: 'gain', filter: filterOf(solution.coefficients) });
  if (fold.symmetry !== 'none') {
    const freest = solve(whole, sums.inputs, regularisation);
    if ('coefficients' in freest) {
      const { coefficients } = freest;
      unshaped.push({ without: 'shape', filter: { coefficients, delay, means: moments.means, band } });
    }
  }
  const filter = filterOf(free);
  // The matrix of a band has the floor in it, which is no part of the error.
  const figure =
    band === null ? fitFigureFromSums(sums, filter, quadraticForm(whole, filter.coefficients)) : null;
  return { filter, figure, free, fold, gain, moments, whole, system, solution, unshaped };
}

/** The conditions of the document's fixed gain; null where it asks for none. */
function askedGain({ document, sampleRate }: Pairing, fold: Fold): GainConditions | null {
  const { fixedGain, delay } = document.filter;
  if (fixedGain === null) return null;
  const { frequency, gain } = fixedGain;
  const path = ['filter', 'fixedGain', 'frequency'];
  if (frequency > sampleRate / 2) {
    throw new Refusal([finding('gain-frequency', { frequency, limit: sampleRate / 2 }, { path })]);
  }
  const conditions = gainConditions(fold, frequency / sampleRate, gain, delay);
  if (conditions === null) throw new Refusal([finding('gain-unreachable', { frequency }, { path })]);
  return conditions;
}

function held(
  { document }: Pairing,
  system: NormalSystem,
  solution: Solution,
  gain: GainConditions,
): Float64Array[] {
  const { fixedGain, regularisation } = document.filter;
  const { coefficients } = solution;
  return holdConditions(coefficients, (fixedGain?.input ?? 1) - 1, gain, (column) => {
    const flat = column.flatMap((row) => Array.from(row));
    const right = Float64Array.from(flat, (value, i) => value / system.scale[i]);
    const solved = solve({ ...system, right }, coefficients.length, regularisation);
    if ('smallestRegularisation' in solved) throw new Error('a system was solved once and not a second time');
    return solved.coefficients;
  });
}

function unsolvable(found: Unsolvable, regularisation: number) {
  const { order, conditionNumber, steps, smallestRegularisation } = found;
  const why =
    order !== null
      ? `the matrix is singular to working accuracy from order ${order + 1}`
      : steps !== null
        ? `conjugate gradients have not settled after ${steps} steps`
        : `the condition number is ${Number(conditionNumber?.toPrecision(2))}`;
  return finding(
    'unsolvable',
    { regularisation, why, smallest: smallestRegularisation },
    { path: ['filter', 'regularisation'] },
  );
}

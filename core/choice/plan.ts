import type { Job } from '../document/pairingDocument';
import { bareFit, hasBareFit } from '../evaluation/measuredRuns';
import { type Finding, finding } from '../findings/finding';
import type { Interval } from '../pair/intervals';
import type { Take } from '../pair/take';
import type { Layout } from './blockSums';
import { commonSegments, cutFolds, type Folds, samplesOf } from './folds';
import { type Centre, delaysFor, type Grid, lengthsUpTo, longestLengths, regularisationsFor } from './grid';

/** What is searched, and what it is judged on. */
export interface Plan {
  grid: Grid;
  layout: Layout;
  folds: Folds;
  findings: Finding[];
}

/** Unknowns at most, unless the document asks for more: a search then takes seconds. */
const mostUnknowns = 1024;

/**
 * Samples for each unknown of the longest candidate, and for each sample of the gap: with fewer the fits on the rest
 * are not those that the whole would give (common practice: ten).
 */
const samplesEach = 10;

/** Fewer differences than this tell little of their spread (common practice: five to ten blocks). */
const wantedBlocks = 5;

/**
 * Candidates around the document's own filter, as far as the fit intervals bear them.
 * @param history samples that a band filter looks back on
 * @param sameSignal whether the desired signal is one of the inputs: delays at which it lies in the filter are left out
 */
export function planSearch(
  takes: readonly Take[],
  job: Job,
  centre: Centre,
  sameSignal: boolean,
  history = 0,
): Plan | { refused: Finding } {
  const inputs = takes[0].inputs.length;
  const wide = sameSignal && centre.delay >= 0 ? Math.min(centre.delay, mostUnknowns) : mostUnknowns;
  const delays = delaysFor(job, centre);
  const bears = (length: number) => {
    const parts = takes.map((take, t) => ({
      take: t,
      intervals: commonSegments(take, length, delays, history),
    }));
    return (
      samplesOf(parts) >= samplesEach * Math.max(inputs * length, length + Math.max(...delays.map(Math.abs)))
    );
  };
  const longest = longestLengths(centre.length, Math.floor(wide / inputs)).find(bears) ?? centre.length;
  const kept = sameSignal ? delays.filter((delay) => delay < 0 || delay >= longest) : delays;
  const grid: Grid = {
    lengths: lengthsUpTo(longest, centre.length),
    delays: kept,
    regularisations: regularisationsFor(centre),
  };
  const folds = cutFolds(takes, {
    length: longest,
    delays: kept,
    history,
    measured: measuredFor(takes, job),
  });
  const { gap, samples, blocks, leastTraining } = folds;
  if (!(leastTraining > 0) || blocks === 0) {
    const values = { samples, wanted: 2 * gap, gap };
    return { refused: finding('too-short-to-choose', values, { path: ['takes', 0, 'fit'] }) };
  }
  const few = { blocks, wanted: wantedBlocks };
  return {
    grid,
    folds,
    layout: { inputs, length: longest, delays: kept },
    findings: blocks < wantedBlocks ? [finding('few-blocks', few, { path: ['takes', 0, 'fit'] })] : [],
  };
}

/**
 * For `cancel` the wanted signal would count as error: where stretches of the fit are known to be without it, errors are
 * taken over these.
 */
function measuredFor(takes: readonly Take[], job: Job): ((take: Take) => Interval[]) | null {
  return job === 'cancel' && takes.some(hasBareFit) ? bareFit : null;
}

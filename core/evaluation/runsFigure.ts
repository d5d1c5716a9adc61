import type { Pace } from '../pace';
import { newErrorTally } from './errorTally';
import type { Filter } from './filter';
import { type ErrorFigure, errorFigure, tallyStretch } from './fitFigure';
import type { Run } from './measuredRuns';

/** The error of a filter, as computed in doubles, over some runs, in the band that it is weighted to. */
export async function runsFigure(runs: readonly Run[], filter: Filter, pace: Pace): Promise<ErrorFigure> {
  const tally = newErrorTally(1, 1);
  for (const { take, segments } of runs) {
    for (const stretch of segments) await tallyStretch(take, stretch, undefined, filter, pace, tally);
  }
  return errorFigure(tally.samples, tally.errorEnergy, tally.desiredEnergy);
}

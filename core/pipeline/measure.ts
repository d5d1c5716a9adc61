import { type ErrorFigure, fitFigure } from '../evaluation/fitFigure';
import { type Evaluation, evaluate } from '../evaluation/heldOutFigures';
import { heldOutRuns, type MeasuredRuns, type Run, runsOver } from '../evaluation/measuredRuns';
import type { Fit } from './fitPair';
import type { Work } from './host';
import type { Pairing } from './pairing';
import { measureKey } from './stageKeys';
import type { Target } from './toTarget';

/** What the filter is worth, over the fit and over data that the fit never saw. */
export interface Measured {
  fit: ErrorFigure;
  heldOut: MeasuredRuns;
  /** False where nothing is held out: the evaluation is over the fit then. */
  proved: boolean;
  runs: Run[];
  evaluation: Evaluation;
}

/** Runs the filter over the held-out data, or over the fit where nothing is held out. */
export async function measure(
  pairing: Pairing,
  fit: Fit,
  target: Target,
  { pace, keep }: Work,
): Promise<Measured> {
  const { document, takes, sampleRate } = pairing;
  const { filter } = fit;
  const heldOut = heldOutRuns(takes, document.job, filter);
  const proved = heldOut.runs.length > 0;
  const runs = proved ? heldOut.runs : runsOver(takes, (take) => take.fit, filter);
  const figures = await keep('figures', measureKey(pairing), async () => ({
    fit: fit.figure ?? (await fitFigure(takes, document.filter.windowing, filter, pace)),
    evaluation: await evaluate(runs, filter, target.filter, sampleRate, pace),
  }));
  return { ...figures, heldOut, proved, runs };
}

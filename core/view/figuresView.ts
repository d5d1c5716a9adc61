import { bareHeldOut } from '../evaluation/measuredRuns';
import type { Fit } from '../pipeline/fitPair';
import type { Measured } from '../pipeline/measure';
import type { Pairing } from '../pipeline/pairing';
import type { QuickFigures } from '../pipeline/quickFigures';
import type { FiguresView } from '../protocol/views';
import { finiteDecibels, finiteOrNull } from './finiteOrNull';

/** The same before the filter has been run. */
export function quickView({ document, takes }: Pairing, quick: QuickFigures): FiguresView {
  const bare = takes.some((take) => bareHeldOut(take).length > 0);
  return {
    ...quick,
    fitDb: finiteDecibels(quick.fitDb),
    heldOutDb: finiteDecibels(quick.heldOutDb),
    trustworthy: document.job !== 'cancel' || bare,
    standardErrorDb: null,
    taps: document.filter.length,
    inputs: takes[0].inputs.length,
    job: document.job,
    provisional: true,
  };
}

/** The figures that a change is made for. */
export function figuresView({ document }: Pairing, fit: Fit, measured: Measured): FiguresView {
  const { total, takes } = measured.evaluation;
  return {
    fitDb: finiteDecibels(measured.fit.nmseDb),
    fitSamples: measured.fit.samples,
    heldOutDb: measured.proved ? finiteDecibels(total.nmseDb) : null,
    heldOutSamples: measured.proved ? total.samples : 0,
    trustworthy: document.job !== 'cancel' || measured.heldOut.disturbanceOnly,
    standardErrorDb: takes.length === 1 ? finiteOrNull(takes[0].standardErrorDb) : null,
    taps: document.filter.length,
    inputs: fit.filter.coefficients.length,
    job: document.job,
  };
}

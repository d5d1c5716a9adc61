import { crossValidated, crossValidatedError, fitted } from '../choice/candidate';
import { decibelsOfE, powerDecibels, roundedDecibels } from '../figures/decibels';
import { fixed } from '../figures/numbers';
import type { Choice } from '../pipeline/choose';
import { macsPerSample } from './filterCost';
import type { Json } from './jsonText';

/**
 * What `choose --json` prints. Figures of the candidates stand at `[length][delay][regularisation]`, cross-validated
 * inside the fit intervals; null where a fit could not be solved, or for a standard error from fewer than four blocks.
 */
export function choiceJson(choice: Choice): { [key: string]: Json } {
  const { search, suggestion, folds, pairing } = choice;
  const { grid, inputs } = search;
  const { chosen, best, steps } = suggestion;
  const { symmetry, length, delay, regularisation } = pairing.document.filter;
  const macs = (taps: number) => macsPerSample(inputs, taps, symmetry);
  const own = {
    length: grid.lengths.indexOf(length),
    delay: grid.delays.indexOf(delay),
    regularisation: grid.regularisations.indexOf(regularisation),
  };
  const overGrid = (figure: (candidate: typeof own) => number | null): Json =>
    grid.lengths.map((_, l) =>
      grid.delays.map((_delay, d) =>
        grid.regularisations.map((_rho, r) =>
          roundedDecibels(figure({ length: l, delay: d, regularisation: r })),
        ),
      ),
    );
  const inDecibels = (share: number) => roundedDecibels(powerDecibels(share));
  return {
    lengths: [...grid.lengths],
    delays: [...grid.delays],
    regularisations: [...grid.regularisations],
    nmseDb: overGrid((candidate) => powerDecibels(crossValidated(search, candidate))),
    standardErrorDb: overGrid((candidate) => relative(crossValidatedError(search, candidate))),
    fitNmseDb: overGrid((candidate) => powerDecibels(fitted(search, candidate))),
    attainableDb: roundedDecibels(choice.attainableDb),
    validation: {
      by: folds.by,
      blocks: folds.blocks,
      gap: folds.gap,
      samples: folds.samples,
      fits: folds.folds.length,
      leastTraining: folds.leastTraining,
    },
    document: { length, delay, regularisation, nmseDb: inDecibels(crossValidated(search, own)) },
    best: {
      length: best.length,
      delay: best.delay,
      regularisation: best.regularisation,
      nmseDb: inDecibels(best.nmse),
    },
    steps: steps.map((step) => ({
      length: step.length,
      delay: step.delay,
      regularisation: step.regularisation,
      macsPerSample: macs(step.length),
      nmseDb: inDecibels(step.nmse),
      excessDb: rise(step.excess / best.nmse),
      boundDb: rise(step.standardError / best.nmse),
    })),
    secondOpinions: choice.opinions.map((opinion) => ({ ...opinion })),
    suggestion: {
      length: chosen.length,
      delay: chosen.delay,
      regularisation: chosen.regularisation,
      nmseDb: inDecibels(chosen.nmse),
      standardErrorDb: roundedDecibels(relative(suggestion.relativeError)),
      heldOutNmseDb: roundedDecibels(choice.heldOut?.nmseDb ?? null),
      macsPerSample: macs(chosen.length),
      reason: choice.reason,
    },
  };
}

/** Four digits after the point: a hundredth of a decibel decides here. */
function rise(share: number): number {
  return Number(fixed(powerDecibels(1 + share), 4));
}

function relative(error: number | null): number | null {
  return error === null ? null : decibelsOfE * error;
}

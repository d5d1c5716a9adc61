import type { Candidate } from '../choice/candidate';
import { type ErrorCurve, errorCurve } from '../choice/errorCurve';
import type { Folds } from '../choice/folds';
import { search } from '../choice/search';
import { say } from '../findings/say';
import { planChoice } from './choiceStatistics';
import type { Work } from './host';
import type { Pairing } from './pairing';

/** Errors along one of length, delay and regularisation, the other two as in the document. */
export interface ChoiceLine extends ErrorCurve {
  values: number[];
  /** Place of the document's own value. */
  own: number;
}

/** The document's choices held against others, without a search over all combinations. */
export interface ChoiceLines {
  length: ChoiceLine;
  delay: ChoiceLine;
  regularisation: ChoiceLine;
  /** How the fit intervals were cut. */
  validation: Pick<Folds, 'by' | 'blocks' | 'gap' | 'samples'>;
}

/** In one sentence, why there are none. */
export interface WithheldLines {
  withheld: string;
}

/** Unknowns from which the lines would take longer than the design. */
const mostUnknowns = 1024;

/** Every regularisation is a factorisation a block: above so many unknowns only the document's neighbours are tried. */
const manyUnknowns = 256;

/**
 * Cross-validates the three lines through the document's filter inside the fit intervals: free taps with covariance
 * windowing, as `choose` does. Held-out data is not touched.
 */
export async function choiceLines(pairing: Pairing, work: Work): Promise<ChoiceLines | WithheldLines> {
  const planned = planChoice(pairing, work);
  if ('refused' in planned) return { withheld: say(planned.refused) };
  const { grid, layout, folds } = planned.plan;
  const { filter } = pairing.document;
  const unknowns = layout.inputs * filter.length;
  if (unknowns > mostUnknowns) {
    return { withheld: 'for so many coefficients it is left to `tapwright choose`.' };
  }
  return work.keep('lines', [planned.key, filter], async () => {
    const statistics = await planned.statistics();
    const { pace } = work;
    const ownRho = { ...grid, regularisations: [filter.regularisation] };
    const place = grid.regularisations.indexOf(filter.regularisation);
    const reach = unknowns > manyUnknowns ? 1 : grid.regularisations.length;
    const regularisations = grid.regularisations.filter((_, i) => Math.abs(i - place) <= reach);
    const ownLength = { ...grid, lengths: [filter.length], regularisations };
    const first = regularisations.indexOf(filter.regularisation);
    const across = await search(statistics, layout, ownRho, { first: 0, pace });
    const along = await search(statistics, layout, ownLength, { first, pace });
    const own: Candidate = {
      length: grid.lengths.indexOf(filter.length),
      delay: grid.delays.indexOf(filter.delay),
      regularisation: 0,
    };
    const { by, blocks, gap, samples } = folds;
    return {
      length: {
        values: grid.lengths,
        own: own.length,
        ...errorCurve(
          across,
          places(grid.lengths, (length) => ({ ...own, length })),
        ),
      },
      delay: {
        values: grid.delays,
        own: own.delay,
        ...errorCurve(
          across,
          places(grid.delays, (delay) => ({ ...own, delay })),
        ),
      },
      regularisation: {
        values: regularisations,
        own: first,
        ...errorCurve(
          along,
          places(regularisations, (regularisation) => ({ ...own, length: 0, regularisation })),
        ),
      },
      validation: { by, blocks, gap, samples },
    };
  });
}

function places(values: readonly number[], at: (place: number) => Candidate): Candidate[] {
  return values.map((_, place) => at(place));
}

import type { Candidate } from '../choice/candidate';
import { crossDb, errorCurve } from '../choice/errorCurve';
import type { SearchResult } from '../choice/searchResult';
import type { PairingDocument } from '../document/pairingDocument';
import { powerDecibels } from '../figures/decibels';
import { macsPerSample } from '../files/filterCost';
import type { Finding } from '../findings/finding';
import type { Choice } from '../pipeline/choose';
import type { ChoiceView } from '../protocol/views';
import { findingView } from './findingView';
import { finiteOrNull } from './finiteOrNull';

/**
 * Curves through the document's own filter, whose values are in the grid whatever else is.
 * @param choice null while the search goes on: curves as far as they are known
 * @param text of the document
 */
export function choiceView(
  search: SearchResult,
  document: PairingDocument,
  choice: Choice | null,
  findings: readonly Finding[],
  text: string,
): ChoiceView {
  const { grid } = search;
  const { length, delay, regularisation, symmetry } = document.filter;
  const present: Candidate = {
    length: grid.lengths.indexOf(length),
    delay: grid.delays.indexOf(delay),
    regularisation: grid.regularisations.indexOf(regularisation),
  };
  const along = (name: keyof Candidate, values: readonly number[]) =>
    errorCurve(
      search,
      values.map((_, place) => ({ ...present, [name]: place })),
    );
  const suggestion = choice?.suggestion ?? null;
  return {
    lengths: [...grid.lengths],
    delays: [...grid.delays],
    regularisations: [...grid.regularisations],
    byLength: along('length', grid.lengths),
    byDelay: along('delay', grid.delays),
    byRegularisation: along('regularisation', grid.regularisations),
    mapDb: Float64Array.from({ length: grid.lengths.length * grid.delays.length }, (_, i) => {
      const l = Math.floor(i / grid.delays.length);
      return crossDb(search, { ...present, length: l, delay: i % grid.delays.length });
    }),
    present: { length, delay, regularisation, crossDb: finiteOrNull(crossDb(search, present)) },
    suggestion: suggestion && {
      length: suggestion.chosen.length,
      delay: suggestion.chosen.delay,
      regularisation: suggestion.chosen.regularisation,
      crossDb: powerDecibels(suggestion.chosen.nmse),
      heldOutDb: finiteOrNull(choice?.heldOut?.nmseDb),
      macsPerSample: macsPerSample(search.inputs, suggestion.chosen.length, symmetry),
      reason: choice?.reason ?? '',
    },
    limitDb: choice?.attainableDb == null ? null : -choice.attainableDb,
    opinions: (choice?.opinions ?? []).map((opinion) => ({ ...opinion })),
    findings: findings.map((found) => findingView(found, text)),
  };
}

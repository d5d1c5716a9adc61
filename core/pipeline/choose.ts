import { edgeFindings, shapeFindings, wantedSignalFindings } from '../choice/choiceFindings';
import type { Folds } from '../choice/folds';
import { type Opinion, secondOpinions } from '../choice/opinions';
import { search } from '../choice/search';
import type { SearchResult } from '../choice/searchResult';
import { type Suggestion, suggest } from '../choice/suggest';
import { suggestionText } from '../choice/suggestionText';
import type { ErrorFigure } from '../evaluation/fitFigure';
import { heldOutRuns } from '../evaluation/measuredRuns';
import { runsFigure } from '../evaluation/runsFigure';
import { macsPerSample } from '../files/filterCost';
import { type Finding, finding, Refusal, worstFirst } from '../findings/finding';
import { say } from '../findings/say';
import { bandOf } from './askedBand';
import { planChoice } from './choiceStatistics';
import { fitPair } from './fitPair';
import type { Host, Work } from './host';
import { inspectSignals } from './inspectSignals';
import { momentsOf } from './momentsOf';
import { type DocumentPlace, type Pairing, readPairing } from './pairing';

/** What a search over length, delay and regularisation found. */
export interface Choice {
  pairing: Pairing;
  search: SearchResult;
  folds: Folds;
  suggestion: Suggestion;
  /** Why, in two sentences. */
  reason: string;
  /** Of the suggestion alone, filtered; null where nothing was held out or it could not be solved. */
  heldOut: ErrorFigure | null;
  opinions: Opinion[];
  /** The most that a linear filter of any length could take off, in dB, from the coherence; null where that is withheld or the error is weighted to a band. */
  attainableDb: number | null;
}

export interface Chosen {
  /** Null where a blocker was found. */
  choice: Choice | null;
  /** Worst first. */
  findings: Finding[];
}

/**
 * Cross-validates candidates inside the fit intervals, suggests one, and looks at the held-out data once, for that one.
 * @param onCurves called with the errors so far whenever those of one more regularisation are known, the document's first
 */
export async function choose(
  host: Host,
  text: string,
  place: DocumentPlace,
  onCurves?: (soFar: SearchResult, pairing: Pairing) => void,
): Promise<Chosen> {
  const findings: Finding[] = [];
  try {
    const read = await readPairing(host, text, place);
    findings.push(...read.findings);
    if (read.pairing === null) return { choice: null, findings: worstFirst(findings) };
    const choice = await chooseFor(read.pairing, host, findings, onCurves);
    return { choice, findings: worstFirst(findings) };
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    return { choice: null, findings: worstFirst([...findings, ...error.findings]) };
  }
}

async function chooseFor(
  pairing: Pairing,
  work: Work,
  findings: Finding[],
  onCurves?: (soFar: SearchResult, pairing: Pairing) => void,
): Promise<Choice> {
  const { document } = pairing;
  const { pace, keep } = work;
  const planned = planChoice(pairing, work);
  if ('refused' in planned) throw new Refusal([planned.refused]);
  const { grid, layout, folds } = planned.plan;
  const found = await keep('search', [planned.key, grid], async () =>
    search(await planned.statistics(), layout, grid, {
      first: grid.regularisations.indexOf(document.filter.regularisation),
      pace,
      ...(onCurves && { onCurves: (soFar: SearchResult) => onCurves(soFar, pairing) }),
    }),
  );
  // The horizon of a prediction is what is wanted of it: a nearer one is easier and no better.
  const kept = document.job === 'predict' ? grid.delays.indexOf(document.filter.delay) : null;
  const suggestion = suggest(found, kept);
  if (suggestion === null) throw new Refusal([finding('nothing-to-choose')]);
  findings.push(
    ...planned.plan.findings,
    ...edgeFindings(grid, suggestion, kept !== null),
    ...shapeFindings(document.filter),
    ...wantedSignalFindings(document.job, pairing.takes),
  );
  const macs = (length: number) => macsPerSample(layout.inputs, length, document.filter.symmetry);
  return {
    pairing,
    search: found,
    folds,
    suggestion,
    reason: suggestionText(suggestion, folds.blocks, macs),
    heldOut: await heldOutOf(pairing, suggestion, work, findings),
    opinions: secondOpinions(found, kept),
    attainableDb:
      bandOf(pairing) === null
        ? (await inspectSignals(pairing, (await momentsOf(pairing, work)).means, work)).spectra.together
            .attainableDb
        : null,
  };
}

/** The suggestion as the document would have it, fitted on all fit intervals and run over the held-out ones. */
async function heldOutOf(
  pairing: Pairing,
  { chosen }: Suggestion,
  work: Work,
  findings: Finding[],
): Promise<ErrorFigure | null> {
  const { document, takes } = pairing;
  const { length, delay, regularisation } = chosen;
  const filter = { ...document.filter, length, delay, regularisation };
  try {
    const fit = await fitPair({ ...pairing, document: { ...document, filter } }, work);
    const { runs } = heldOutRuns(takes, document.job, fit.filter);
    if (runs.length > 0) return await runsFigure(runs, fit.filter, work.pace);
    findings.push(finding('no-held-out', {}, { path: ['takes', 0] }));
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    const why = error.findings.map(say).join(' ');
    findings.push(finding('suggestion-unsolvable', { regularisation, why }, { path: ['filter'] }));
  }
  return null;
}

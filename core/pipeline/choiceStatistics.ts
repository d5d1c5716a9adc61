import { gatherStatistics, type Statistics } from '../choice/blockSums';
import { type Plan, planSearch } from '../choice/plan';
import type { Finding } from '../findings/finding';
import { bandOf } from './askedBand';
import type { Work } from './host';
import { momentsOf } from './momentsOf';
import type { Pairing } from './pairing';
import { momentsKey } from './stageKeys';

/** A search that can be made, and what it rests on. */
export interface PlannedSearch {
  plan: Plan;
  /** Of the statistics, for results kept. */
  key: unknown;
  /** Gathered when first asked for, in one pass over the fit intervals. */
  statistics(): Promise<Statistics>;
}

/** Plans the search around the document's filter, or says why there can be none. */
export function planChoice(pairing: Pairing, work: Work): PlannedSearch | { refused: Finding } {
  const { document, takes } = pairing;
  const band = bandOf(pairing);
  const plan = planSearch(takes, document.job, document.filter, desiredIsInput(pairing), band?.history);
  if ('refused' in plan) return plan;
  const { layout, folds } = plan;
  const key = [momentsKey(pairing), document.prepare, layout, folds];
  const statistics = () =>
    work.keep('blocks', key, async () =>
      gatherStatistics(takes, folds, layout, await momentsOf(pairing, work), work.pace, band),
    );
  return { plan, key, statistics };
}

function desiredIsInput({ takes, recordings }: Pairing): boolean {
  const digest = (file: string) => recordings.get(file)?.sha256;
  return takes.some(({ inputs, desired }) =>
    inputs.some(
      ({ recording, channel }) =>
        digest(recording.file) === digest(desired.recording.file) && channel === desired.channel,
    ),
  );
}

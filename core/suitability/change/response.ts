import type { PairingDocument } from '../../document/pairingDocument';
import type { Pace } from '../../pace';
import { type Interval, totalLength } from '../../pair/intervals';
import type { Means } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { type Coefficients, fitBlocks, leastRegularisation } from '../blocks/blockFit';
import { type Block, gatherBlocks } from '../blocks/blockSums';
import { type Comparison, compareErrors, proves } from '../blocks/compare';
import { crossErrors, jackknifedFit, surelyWrong } from '../blocks/crossFit';
import { windowsOver } from '../blocks/windows';

/** Parts of a take over which another filter holds than over the rest. */
export interface ResponseChange {
  /** The part where it matters most. */
  part: Interval;
  /** By how much a filter fitted to the part itself leaves less error there than one fitted to all other parts. */
  comparison: Comparison;
  /** How many parts differ, of how many. */
  differing: number;
  parts: number;
}

/** Taps of all inputs together; more would need longer parts to be told apart. */
export const mostTaps = 128;
/** Samples of a part for each tap: then the half it is fitted on costs 10 % (0.4 dB) more error than all would. */
const samplesPerTap = 20;
const mostParts = 8;
/** Windows in a part, dealt out to two fits; enough for a standard error. */
const windowsPerPart = 8;
const largestWindow = 4096;

/** Gain in dB from which a changing response is worth a word: an adaptive filter or a fit for each state would show. */
const leastGain = 1;

/**
 * Fits the filter on half of a part and judges it on the other half, against the filter fitted to all other parts. A
 * response that holds throughout lets the second win, since it saw more; noise that changes counts for both alike.
 * @param stretches of the fit in which nothing but the inputs and noise goes into the desired signal
 * @returns null where no part differs or they are too short for three parts
 */
export async function responseChange(
  take: Take,
  stretches: readonly Interval[],
  { filter }: Pick<PairingDocument, 'filter'>,
  means: Means,
  pace: Pace,
): Promise<ResponseChange | null> {
  const inputs = take.inputs.length;
  const length = Math.max(1, Math.min(filter.length, Math.floor(mostTaps / inputs)));
  const total = totalLength(stretches);
  const parts = Math.min(mostParts, Math.floor(total / (samplesPerTap * inputs * length)));
  if (parts < 3) return null;
  const windows = parts * windowsPerPart;
  const size = Math.min(largestWindow, Math.floor((0.9 * total) / windows));
  const shape = { length, delay: filter.delay };
  const blocks = await gatherBlocks(take, windowsOver(stretches, size, windows), shape, means, pace);
  const grouped = Array.from({ length: parts }, (_, p) =>
    blocks.slice(Math.floor((p * blocks.length) / parts), Math.floor(((p + 1) * blocks.length) / parts)),
  );
  const regularisation = Math.max(filter.regularisation, leastRegularisation);
  const fit = remembered(regularisation);

  let worst: { part: Block[]; comparison: Comparison } | null = null;
  let differing = 0;
  for (const part of grouped) {
    const own = crossErrors(part, regularisation);
    const rest = jackknifedFit(
      grouped.filter((other) => other !== part),
      fit,
    );
    await pace.step('change', 1, parts);
    if (own === null || rest === null) continue;
    const comparison = compareErrors(
      own,
      part.map((block) => surelyWrong(block, rest)),
    );
    if (comparison === null || !proves(comparison, leastGain)) continue;
    differing++;
    if (worst === null || comparison.gainDb > worst.comparison.gainDb) worst = { part, comparison };
  }
  if (worst === null) return null;
  const { part, comparison } = worst;
  return {
    part: { from: part[0].window.from, to: part[part.length - 1].window.to },
    comparison,
    differing,
    parts,
  };
}

/** Leaving out one part and then another is the same as the other way round: each fit is made once. */
function remembered(regularisation: number) {
  const known = new Map<string, Coefficients | null>();
  return (groups: readonly (readonly Block[])[]) => {
    const key = groups.map(([first]) => first?.window.from).join();
    const fit = known.has(key) ? (known.get(key) ?? null) : fitBlocks(groups.flat(), regularisation);
    known.set(key, fit);
    return fit;
  };
}

import type { Pace } from '../../pace';
import { type Interval, totalLength } from '../../pair/intervals';
import type { Means } from '../../pair/signals';
import { type CrossSpectra, newCrossSpectra, newSlopeSpectra, pickSignals } from '../../spectra/crossSpectra';
import { poolSpectra } from '../../spectra/poolSpectra';
import { type Attainable, attainable } from './attainable';
import { type AlignedTake, gatherSpectra, spreadOver } from './gatherSpectra';
import type { RungFigure } from './rungFigure';
import { averagesOf, segmentLadder, wantedAverages } from './segmentLadder';

/** Spectra by segments as long as the response asks for, and what they say of the attainable reduction. */
export interface SettledSpectra {
  /** Of each take, over all its stretches; all by the same segments. */
  takes: { spectra: CrossSpectra; attainable: Attainable }[];
  /** Of all takes together, each delayed as it is aligned. */
  together: { spectra: CrossSpectra; attainable: Attainable };
}

export interface SettleOptions {
  means: Means;
  /** Hz. */
  sampleRate: number;
  /** Samples of the segments of the spectra shown, at least, where the recording is long enough. */
  resolution: number;
  /** From spectra with slopes. */
  figure: (spectra: CrossSpectra) => RungFigure;
  pace: Pace;
}

/** Samples, over all takes, on which segments of all lengths are tried: enough for 24 averages of the longest. */
const budget = 524288;

/**
 * Tries segments that double on a sample of each take, which tells the attainable reduction and how long the response
 * is; then gathers spectra of all of it. A recording within the budget is read once.
 * @param takes at least one, all of the same inputs
 */
export async function settleSpectra(
  takes: readonly AlignedTake[],
  options: SettleOptions,
): Promise<SettledSpectra> {
  const { means, sampleRate, figure, pace } = options;
  const inputs = takes[0].take.inputs.length;
  const share = Math.max(budget / 8, Math.floor(budget / takes.length));
  const sampled = takes.map((aligned) => ({ ...aligned, stretches: spreadOver(aligned.stretches, share) }));
  const stretches = sampled.flatMap((aligned) => aligned.stretches);
  const lengths = segmentLadder(stretches, inputs);
  const rungs: CrossSpectra[][] = [];
  for (const aligned of sampled) {
    const gatherers = lengths.map((segment) => newSlopeSpectra(inputs, segment, sampleRate));
    rungs.push(await gatherSpectra(aligned, means, gatherers, pace));
  }
  const pool = (parts: readonly CrossSpectra[]) =>
    poolSpectra(parts.map((spectra, t) => ({ spectra, delay: takes[t].lag - takes[0].lag })));
  const together = attainable(lengths.map((_, i) => figure(pool(rungs.map((own) => own[i])))));

  const segment = shownSegment(lengths, together.segment, options.resolution, stretches);
  const plain = [...Array.from({ length: inputs }, (_, r) => r), 2 * inputs];
  const spectra: CrossSpectra[] = [];
  for (const [t, aligned] of takes.entries()) {
    const whole = totalLength(sampled[t].stretches) === totalLength(aligned.stretches);
    if (whole) spectra.push(pickSignals(rungs[t][lengths.indexOf(segment)], plain));
    else {
      const gatherer = newCrossSpectra(inputs + 1, segment, sampleRate);
      spectra.push(...(await gatherSpectra(aligned, means, [gatherer], pace)));
    }
  }
  const alone = takes.length === 1 ? [together] : rungs.map((own) => attainable(own.map(figure)));
  return {
    takes: spectra.map((own, t) => ({ spectra: own, attainable: alone[t] })),
    together: { spectra: pool(spectra), attainable: together },
  };
}

/**
 * The segments of the spectra shown: without slopes a response asks for segments twice as long as those that the figure
 * rests on; no shorter than the resolution asked for; both as far as the averages allow.
 */
function shownSegment(
  lengths: readonly number[],
  settled: number | null,
  resolution: number,
  stretches: readonly Interval[],
): number {
  const wanted = Math.max(resolution, settled === null ? 0 : 2 * settled);
  const least = settled ?? lengths[0];
  const possible = lengths.filter(
    (segment) =>
      segment === least ||
      (segment > least && segment <= wanted && averagesOf(stretches, segment) >= wantedAverages),
  );
  return possible[possible.length - 1];
}

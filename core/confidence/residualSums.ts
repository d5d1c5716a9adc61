import type { Windowing } from '../document/pairingDocument';
import { type Filter, filterLength } from '../evaluation/filter';
import { fitStretches } from '../evaluation/fitStretches';
import type { Pace } from '../pace';
import { bandReader } from '../pair/bandSignals';
import type { Interval } from '../pair/intervals';
import { type SignalReader, signalReader } from '../pair/signals';
import type { Take } from '../pair/take';
import { addSums, emptySums, type NormalSums } from '../statistics/normalSums';
import { sumStretch } from '../statistics/sumStretch';
import { bounded, residualReader } from './residualReader';

/**
 * Correlations of the inputs and the residual over the n of the fit, in the band that the error is weighted to: the sums
 * of their normal equations, the residual being the last input (see `residualReader`), for lags from 0 up to `length`.
 * `correlations[r][K]`: input r so much before the residual; `correlations[K][r]`: the residual before input r.
 */
export interface ResidualSums {
  total: NormalSums;
  /** Parts of the data, each of about one level, that add up to the total. */
  parts: NormalSums[];
  /** Number of n of the fit, more than those of the total where that is a sample of them. */
  samples: number;
}

/** Parts of one stretch at most; a level that changes faster than them counts as one. */
const mostParts = 32;

/** Shortest part: each costs transforms of a thousand samples whatever its length. */
const shortestPart = 256;

/** Samples that tell correlations and tests well enough; where there are more, parts are spread evenly over them. */
const enoughSamples = 262_144;

/** @param lags how many, 0 included */
export async function residualSums(
  takes: readonly Take[],
  windowing: Windowing,
  filter: Filter,
  lags: number,
  pace: Pace,
): Promise<ResidualSums> {
  const inputs = filter.coefficients.length;
  const total = emptySums(inputs + 1, lags);
  const parts: NormalSums[] = [];
  const stretches = fitStretches(takes, windowing, filter);
  const samples = stretches.reduce((sum, { count }) => sum + count, 0);
  const shortest = Math.max(shortestPart, Math.ceil(samples / mostParts));
  const longest = enoughSamples / mostParts;
  for (const { take, stretch, support, count } of stretches) {
    const read = readerOf(take, filter, stretch.from, support, pace);
    for (const piece of cut(stretch, shortest, longest)) {
      const part = await sumStretch(read, piece, inputs + 1, lags, false, pace);
      part.count = (count * (piece.to - piece.from)) / (stretch.to - stretch.from);
      addSums(total, part);
      parts.push(part);
    }
  }
  return { total, parts, samples };
}

function readerOf(
  take: Take,
  filter: Filter,
  start: number,
  support: Interval | undefined,
  pace: Pace,
): SignalReader {
  const { means, delay, coefficients, band } = filter;
  const read = signalReader(take, { means, delay, support });
  if (!band) return residualReader(read, coefficients, start, pace);
  const early = residualReader(read, coefficients, start - band.history, pace);
  return bounded(bandReader(early, band), start, filterLength(filter) - 1);
}

/** As many pieces, evenly spread, as are no shorter than asked, one at least; each cut off where it is too long. */
function cut({ from, to }: Interval, shortest: number, longest: number): Interval[] {
  const pieces = Math.max(1, Math.floor((to - from) / shortest));
  const place = (i: number) => from + Math.floor(((to - from) * i) / pieces);
  return Array.from({ length: pieces }, (_, i) => ({
    from: place(i),
    to: Math.min(place(i + 1), place(i) + longest),
  }));
}

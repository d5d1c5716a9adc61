import type { Windowing } from '../document/pairingDocument';
import { powerDecibels } from '../figures/decibels';
import type { Pace } from '../pace';
import { type Interval, totalLength } from '../pair/intervals';
import { signalReader } from '../pair/signals';
import type { Take } from '../pair/take';
import { type ErrorTally, newErrorTally } from './errorTally';
import { type Filter, filterLength } from './filter';
import { filterStretch } from './filterStretch';
import { runsOver } from './measuredRuns';

/** Error of the filter over a set of samples n. */
export interface ErrorFigure {
  /** Number of n used. */
  samples: number;
  /** Mean of e², in the desired signal's unit squared. */
  mse: number;
  /** `10 log10(Σ e² / Σ d[n-Δ]²)`. */
  nmseDb: number;
}

export function errorFigure(samples: number, errorEnergy: number, desiredEnergy: number): ErrorFigure {
  return { samples, mse: errorEnergy / samples, nmseDb: powerDecibels(errorEnergy / desiredEnergy) };
}

/**
 * The error over the very n and with the very signals of the fit, found by filtering again: sums of squares found from
 * the statistics mean nothing below about -140 dB.
 */
export async function fitFigure(
  takes: readonly Take[],
  windowing: Windowing,
  filter: Filter,
  pace: Pace,
): Promise<ErrorFigure> {
  const tally = newErrorTally(1, 1);
  if (windowing === 'covariance') {
    for (const { take, segments } of runsOver(takes, (t) => t.fit, filter)) {
      for (const segment of segments) await tallyStretch(take, segment, undefined, filter, pace, tally);
    }
    return errorFigure(tally.samples, tally.errorEnergy, tally.desiredEnergy);
  }
  for (const take of takes) {
    for (const interval of take.fit) {
      const whole = {
        from: interval.from + Math.min(0, filter.delay),
        to: interval.to + Math.max(filterLength(filter) - 1, filter.delay),
      };
      await tallyStretch(take, whole, interval, filter, pace, tally);
    }
  }
  const samples = takes.reduce((sum, take) => sum + totalLength(take.fit), 0);
  return errorFigure(samples, tally.errorEnergy, tally.desiredEnergy);
}

async function tallyStretch(
  take: Take,
  stretch: Interval,
  support: Interval | undefined,
  filter: Filter,
  pace: Pace,
  tally: ErrorTally,
): Promise<void> {
  const read = signalReader(take, { means: filter.means, delay: filter.delay, support });
  await filterStretch(read, stretch, filter.coefficients, pace, ({ desired, output }) => {
    tally.add(desired, output);
  });
}

import type { Windowing } from '../document/pairingDocument';
import { powerDecibels } from '../figures/decibels';
import type { Pace } from '../pace';
import type { Interval } from '../pair/intervals';
import { signalReader } from '../pair/signals';
import type { Take } from '../pair/take';
import type { NormalSums } from '../statistics/normalSums';
import { type ErrorTally, newErrorTally } from './errorTally';
import type { Filter } from './filter';
import { filterStretch } from './filterStretch';
import { fitStretches } from './fitStretches';
import { newWeighing } from './weighing';

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

/** Below this the error that the statistics tell has lost too many digits, and the filter is run again. */
const lowestFromSums = -80;

/**
 * The error over the n of the fit as the statistics tell it: `Σ d² - 2 wᵀθ + wᵀΦw`. Relative error about 1e-15 divided by
 * the error's share of the power, so 1e-7 at -80 dB.
 * @param output `wᵀ (Φ/L) w`
 * @returns null where that is too inexact
 */
export function fitFigureFromSums(sums: NormalSums, filter: Filter, output: number): ErrorFigure | null {
  let cross = 0;
  filter.coefficients.forEach((row, r) => {
    row.forEach((w, k) => {
      cross += w * sums.cross[r][k];
    });
  });
  const energy = sums.desiredEnergy - 2 * cross + output * sums.count;
  const figure = errorFigure(sums.count, energy, sums.desiredEnergy);
  return figure.nmseDb > lowestFromSums ? figure : null;
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
  let samples = 0;
  for (const { take, stretch, support, count } of fitStretches(takes, windowing, filter)) {
    await tallyStretch(take, stretch, support, filter, pace, tally);
    samples += count;
  }
  return errorFigure(samples, tally.errorEnergy, tally.desiredEnergy);
}

/** Adds the error over a stretch of n, in the band that it is weighted to. */
export async function tallyStretch(
  take: Take,
  stretch: Interval,
  support: Interval | undefined,
  filter: Filter,
  pace: Pace,
  tally: ErrorTally,
): Promise<void> {
  const read = signalReader(take, { means: filter.means, delay: filter.delay, support, reuse: true });
  const weighing = newWeighing(filter.band);
  await filterStretch(read, weighing.begin(stretch), filter.coefficients, pace, ({ desired, output }) => {
    const weighed = weighing.push([desired, output]);
    if (weighed !== null) tally.add(weighed.inside[0], weighed.inside[1]);
  });
}

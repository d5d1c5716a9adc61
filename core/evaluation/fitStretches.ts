import type { Windowing } from '../document/pairingDocument';
import type { Interval } from '../pair/intervals';
import type { Take } from '../pair/take';
import { type Filter, filterLength } from './filter';
import { runsOver } from './measuredRuns';

/** A run of n over which the fit takes its error. */
export interface FitStretch {
  take: Take;
  stretch: Interval;
  /** Outside it every signal counts as zero; undefined where the true samples count. */
  support: Interval | undefined;
  /** What it adds to the number that sums are divided by. */
  count: number;
}

/** The very n of the fit and how its windowing sees the signals there. */
export function fitStretches(takes: readonly Take[], windowing: Windowing, filter: Filter): FitStretch[] {
  if (windowing === 'covariance') {
    return runsOver(takes, (take) => take.fit, filter).flatMap(({ take, segments }) =>
      segments.map((stretch) => ({
        take,
        stretch,
        support: undefined,
        count: stretch.to - stretch.from,
      })),
    );
  }
  const { delay } = filter;
  const late = Math.max(filterLength(filter) - 1, delay) + (filter.band?.history ?? 0);
  return takes.flatMap((take) =>
    take.fit.map((support) => ({
      take,
      stretch: { from: support.from + Math.min(0, delay), to: support.to + late },
      support,
      count: support.to - support.from,
    })),
  );
}

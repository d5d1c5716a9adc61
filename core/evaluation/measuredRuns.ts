import type { Job } from '../document/pairingDocument';
import { type Interval, intersect, totalLength } from '../pair/intervals';
import type { Take } from '../pair/take';
import { usedSegments } from '../pair/usedSegments';
import { type Filter, filterLength } from './filter';

/** Runs of n of one take over which figures are taken. */
export interface Run {
  take: Take;
  segments: Interval[];
  /** Number of n. */
  samples: number;
}

export interface MeasuredRuns {
  runs: Run[];
  /** True where every run lies in `disturbanceOnly` intervals. */
  disturbanceOnly: boolean;
  /** Takes with held-out samples that these runs leave out, since their wanted signal would count as error. */
  leftOut: string[];
}

/**
 * Where the held-out figures are taken: over the usable held-out n of every take. For `cancel` the wanted signal would
 * count as error: there the figures are taken over the held-out part of the `disturbanceOnly` intervals, of the takes
 * that have one; where none has, over all.
 */
export function heldOutRuns(takes: readonly Take[], job: Job, filter: Filter): MeasuredRuns {
  const all = runsOver(takes, (take) => take.heldOut, filter);
  if (job !== 'cancel') return { runs: all, disturbanceOnly: false, leftOut: [] };
  const bare = runsOver(takes, bareHeldOut, filter);
  if (bare.length === 0) return { runs: all, disturbanceOnly: false, leftOut: [] };
  const measured = new Set(bare.map((run) => run.take));
  return {
    runs: bare,
    disturbanceOnly: true,
    leftOut: all.filter((run) => !measured.has(run.take)).map((run) => run.take.name),
  };
}

/** The held-out part that is known to be without the wanted signal. */
export function bareHeldOut({ heldOut, disturbanceOnly }: Take): Interval[] {
  return intersect(heldOut, disturbanceOnly);
}

/** The part of the fit that is known to be without the wanted signal. */
export function bareFit({ fit, disturbanceOnly }: Pick<Take, 'fit' | 'disturbanceOnly'>): Interval[] {
  return intersect(fit, disturbanceOnly);
}

/** Whether some of the fit is known to be without the wanted signal. */
export function hasBareFit(take: Pick<Take, 'fit' | 'disturbanceOnly'>): boolean {
  return bareFit(take).length > 0;
}

/** Where {@link heldOutRuns} are taken, as intervals, whatever the filter. */
export function heldOutIntervals(takes: readonly Take[], job: Job): (take: Take) => Interval[] {
  const hasBare = takes.some((take) => bareHeldOut(take).length > 0);
  return job === 'cancel' && hasBare ? bareHeldOut : (take) => take.heldOut;
}

/** The usable n of some intervals of each take; takes with none are left out. */
export function runsOver(
  takes: readonly Take[],
  intervals: (take: Take) => readonly Interval[],
  filter: Filter,
): Run[] {
  return takes
    .map((take) => {
      const history = filter.band?.history ?? 0;
      const segments = usedSegments(take, intervals(take), filterLength(filter), filter.delay, history);
      return { take, segments, samples: totalLength(segments) };
    })
    .filter((run) => run.samples > 0);
}

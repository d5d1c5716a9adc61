import { decibelsOfE, powerDecibels } from '../../figures/decibels';
import type { RungFigure, Share } from './rungFigure';

/** Why a figure is withheld. */
export type Withheld = 'too-short' | 'unsettled' | 'silent' | 'several-steps';

/** The largest reduction that a linear filter without limits (two-sided, of any length) could reach. */
export interface Attainable {
  /** dB; null where it is withheld. */
  reductionDb: number | null;
  withheld: Withheld | null;
  /** Where it is withheld because longer segments still raise it: it is no smaller than this. */
  atLeastDb: number | null;
  /** In the bands of the evaluation; null where the band's figure is withheld. */
  bandsDb: (number | null)[];
  /** Samples of the segments it rests on, twice those that hold the whole response; null where it is withheld. */
  segment: number | null;
  /** Their averages, effective; 0 where it is withheld. */
  averages: number;
}

/** Doubling the segment must move the figure by less than this (dB), which is what it may be wrong by. */
const largestMove = 1;

/**
 * A move below this (dB) is enough by itself: for a slow decay the next doublings together move it by as much again. A
 * larger one counts where it is no more than a third of the one before: then the rest is half of it at most. (What the
 * ends of segments cost falls with the fourth power of their length for a short response.)
 */
const settled = 0.5;
const dying = 3;

/** Standard error (dB) up to which a figure is shown: four of them are the 1 dB that it may be off. */
const largestError = 0.25;

/** Fewer averages than this for each response and one more leave the bias larger than the figure. */
export const averagesPerInput = 4;

/**
 * Coherence found from segments shorter than the response shows too little; from long ones it is noisy. The shortest
 * segments are taken beyond which longer ones show no more: they hold the whole response.
 * @param rungs by segments that double, shortest first
 */
export function attainable(rungs: readonly RungFigure[]): Attainable {
  const none = { reductionDb: null, atLeastDb: null, bandsDb: [], segment: null, averages: 0 };
  if (rungs.some(({ averages, total }) => averages > 0 && Number.isNaN(total.left))) {
    return { ...none, withheld: 'silent' };
  }
  const usable = rungs.filter(({ averages, inputs }) => averages >= averagesPerInput * (inputs + 1));
  if (usable.length < 2) return { ...none, withheld: 'too-short' };
  const totals = usable.map(({ total }) => total);
  const reductionDb = settledFigure(totals);
  const bandsDb = usable[0].bands.map((_, b) => settledFigure(usable.map(({ bands }) => bands[b])));
  const place = settledFrom(totals);
  if (reductionDb === null || place === null) {
    const last = totals[totals.length - 1];
    const atLeastDb = errorDb(last) <= largestError ? Math.max(0, reduction(last)) : null;
    return { ...none, bandsDb, withheld: place === null ? 'unsettled' : 'too-short', atLeastDb };
  }
  const { segment, averages } = usable[place + 1];
  return { reductionDb, withheld: null, atLeastDb: null, bandsDb, segment, averages };
}

/**
 * The figure of segments twice as long as those that hold the response: with more of them than of the longest, less
 * hangs on their bias having been taken off. Null where there are none or where they do not show it well enough.
 */
function settledFigure(shares: readonly Share[]): number | null {
  const place = settledFrom(shares);
  if (place === null || errorDb(shares[place + 1]) > largestError) return null;
  return Math.max(0, reduction(shares[place + 1]));
}

/** The first of the figures that no longer segment moves, the longest included; null where the last doubling moves it. */
function settledFrom(shares: readonly Share[]): number | null {
  const last = shares.length - 1;
  const move = moved(shares[last - 1], shares[last]);
  const before = last > 1 ? moved(shares[last - 2], shares[last - 1]) : 0;
  if (!(move < settled || (move < largestMove && before >= dying * move))) return null;
  let place = last - 1;
  while (place > 0 && moved(shares[place - 1], shares[last]) < settled) place--;
  return place;
}

function moved(short: Share, long: Share): number {
  const change = reduction(long) - reduction(short);
  return Number.isNaN(change) ? Number.POSITIVE_INFINITY : Math.abs(change);
}

function reduction({ left }: Share): number {
  return -powerDecibels(left);
}

/** To first order: d(10 log10 r) = (10 / ln 10) dr / r. */
function errorDb({ error }: Share): number {
  return decibelsOfE * error;
}

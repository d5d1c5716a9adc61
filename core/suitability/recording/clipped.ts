import { counted } from '../../figures/numbers';
import { type Finding, finding } from '../../findings/finding';
import { type ChannelFacts, positionsInWords } from './check';
import { type Beside, hasCorners } from './corners';
import type { FlatRun, RunVisitor } from './flatRuns';
import type { Resolution } from './resolution';
import type { TopValue, TopValues } from './topValues';

/** Runs of fewer equal samples come about at any smooth peak that lies between two samples. */
const shortestRun = 3;

/** Two runs can be no accident of the signal's form; one is believed at full scale, or where it is long. */
const fewestRuns = 2;
const longEnough = 16;

/** A peak of the form 1 - t^4 is at its top 5.3 times as often as at the step below; noise is there less often. */
const crowded = 8;
const fewestVisits = 8;

/**
 * From here on a value is a level that the signal keeps, not a limit that it runs into: a sine overdriven by 6 dB is at
 * either limit for a third of the time. Where a format ends it is a limit whatever the share.
 */
const levelShare = 0.4;
const levelsShare = 0.75;
/** Zero is where many signals rest. */
const zeroShare = 0.25;
/** A value so far from the next one, in parts of the rest of the range, is not run into. Signals fall off to zero. */
const gap = 0.25;
const zeroGap = 0.1;

/** The largest amplitude that all fixed-point formats reach: µ-law ends at 0.9803. */
const pcmFullScale = 0.98;

/** Runs at one end of the range. */
interface End {
  value: number;
  /** Equal pairs of neighbours at this value. */
  pairs: number;
  /** Runs with corners on both sides. */
  runs: number;
  longest: number;
}

export interface Clipped {
  run: RunVisitor['run'];
  /** @param isApart whether the signal falls off to a value, so that it is no limit */
  findings(facts: ChannelFacts, isApart: (value: number) => boolean): Finding[];
}

/**
 * Clipping: the signal comes to its largest or smallest value again and again, at full slope, and stays there or is there
 * far more often than at the values beside it. Signals that keep still at other values too (steps, binary sequences) are
 * made of levels and are not clipped.
 */
export function newClipped(resolution: Resolution, top: TopValues, bottom: TopValues): Clipped {
  const ends: [End, End] = [newEnd(), newEnd()];
  let pairs = 0;

  function note(end: End, value: number, run: FlatRun, beside: Beside): void {
    if (value < end.value) return;
    if (value > end.value) Object.assign(end, { value, pairs: 0, runs: 0, longest: 0 });
    end.pairs += run.length - 1;
    if (run.length < shortestRun) return;
    if (!hasCorners(run, beside, resolution.stepAt(run.value))) return;
    end.runs++;
    end.longest = Math.max(end.longest, run.length);
  }

  return {
    run(run, beside) {
      pairs += run.length - 1;
      note(ends[0], run.value, run, beside);
      note(ends[1], -run.value, run, beside);
    },
    findings(facts, isApart) {
      if (top.values.length < 2) return [];
      const inside = facts.samples - top.values[0].count - bottom.values[0].count;
      const insidePairs = pairs - atEnd(ends[0], top) - atEnd(ends[1], bottom);
      const share = 1 - inside / facts.samples;
      const stillness = inside > 0 ? insidePairs / inside : 1;
      const clipped = [top, bottom].filter(
        (values, e) => !isApart(level(values, bottom)) && isClipped(values, ends[e], facts, share, stillness),
      );
      return clipped.length === 0 ? [] : [report(clipped, bottom, facts)];
    },
  };
}

function newEnd(): End {
  return { value: Number.NEGATIVE_INFINITY, pairs: 0, runs: 0, longest: 0 };
}

/** Equal pairs at the largest value; none where the runs seen were all below it. */
function atEnd(end: End, { values }: TopValues): number {
  return end.value === values[0].value ? end.pairs : 0;
}

function isClipped(
  { values }: TopValues,
  end: End,
  { samples, pcm, levels }: ChannelFacts,
  bothShares: number,
  stillness: number,
): boolean {
  const [{ value, count }, ...below] = values;
  const full = pcm ? value >= pcmFullScale : levels.whole && isConverterLimit(value);
  const share = count / samples;
  if (!full && (share >= levelShare || bothShares >= levelsShare)) return false;
  if (value === 0 && share >= zeroShare) return false;
  const rest = levels.max - levels.min - (value - below[0].value);
  if (value - below[0].value > (value === 0 ? zeroGap : gap) * rest && !full) return false;
  if (isCrowded(values[0], below)) return true;
  if (end.value !== value || stillness >= (0.5 * end.pairs) / count) return false;
  return end.runs >= (full ? 1 : fewestRuns) || end.longest >= longEnough;
}

/** Counted by visits, so that a value where the signal settles does not look crowded. */
function isCrowded({ visits }: TopValue, below: readonly TopValue[]): boolean {
  const most = Math.max(...below.map((other) => other.visits));
  return below.length > 3 && visits >= fewestVisits && visits >= crowded * most;
}

/** 2^k - 1 or 2^k, of 8 bits and more: where converters end. `value` is the largest, or the negative of the smallest. */
function isConverterLimit(value: number): boolean {
  let limit = 128;
  while (limit < value) limit *= 2;
  return value === limit || value === limit - 1;
}

function report(clipped: readonly TopValues[], bottom: TopValues, facts: ChannelFacts): Finding {
  const firsts = clipped.flatMap(({ firsts }) => [...firsts]).sort((a, b) => a - b);
  const runs = clipped.reduce((sum, { values }) => sum + values[0].visits, 0);
  const levels = clipped.map((values) => Number(level(values, bottom).toPrecision(6)));
  const samples = clipped.reduce((sum, { values }) => sum + values[0].count, 0);
  const values = {
    samples,
    runs,
    extent: `${counted(samples, 'sample')} in ${counted(runs, 'run')}`,
    level: levels.join(' or '),
    positions: positionsInWords(firsts, runs),
  };
  return finding('clipped', values, { ...facts.place, from: firsts[0] });
}

function level(values: TopValues, bottom: TopValues): number {
  return values === bottom ? 0 - values.values[0].value : values.values[0].value;
}

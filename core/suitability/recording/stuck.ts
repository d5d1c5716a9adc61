import { grouped } from '../../figures/numbers';
import { type Finding, finding } from '../../findings/finding';
import { type ChannelFacts, positionsInWords } from './check';
import { type LongRun, sideSamples } from './flatRuns';
import { courseOf, isFarOff, isMoving, powerOf } from './sides';

/**
 * A signal is moving where few of its neighbouring samples are equal: the longer the run, the more may be. Each row: a
 * chance that shows as so few on both sides gives a run of that length once in 10^10 samples at most, and a smooth peak
 * or a slow, coarsely stepped signal has more equal pairs beside such a run.
 */
const stillest: readonly (readonly [length: number, part: number])[] = [
  [32, 0.25],
  [16, 0.05],
  [8, 0.02],
];

/** A ramp that is held never turns, and at its foot once. */
const fewestTurns = 2;

/** A smooth signal goes on where it would have been, with a step that nothing beside the run comes near. */
const jumping = 3;

/** A signal that is at one value for more than this part of the time rests there. */
const mostShare = 0.25;

/**
 * Seconds from which a stretch of zeros is a pause of the source, and samples where no rate is known: what is lost is a
 * few buffers or packets of 1 ms to 50 ms.
 */
const pauseSeconds = 0.2;
const pauseSamples = 8192;

/** A source that pauses has come down to this part of its rms, in amplitude; what is lost is lost at full level. */
const quiet = 0.125;

/** Stretches kept; a recording with more of them is of no use anyway. */
const mostStretches = 4096;

interface Stretch {
  value: number;
  from: number;
  length: number;
  /** Nothing beside it comes near its value. */
  apart: boolean;
  /** Mean square beside it, on the quieter side. */
  power: number;
}

export interface Stuck {
  longRun(run: LongRun): void;
  /** Whether the signal does not run into this value but falls off to it. */
  isApart(value: number): boolean;
  findings(facts: ChannelFacts): Finding[];
}

/**
 * Stretches of exactly the same value in a signal that moves before and after: `dropout` where the value is 0, otherwise
 * `stuck`. Stretches at the largest or smallest value count where it is far from everything beside them; otherwise they are
 * clipped, if anything. Zeros at the beginning or the end of a recording are a pause.
 */
export function newStuck(sampleRate: number | null): Stuck {
  const longestDropout = sampleRate === null ? pauseSamples : pauseSeconds * sampleRate;
  const stretches: Stretch[] = [];

  function isApart(value: number): boolean {
    const own = stretches.filter((stretch) => stretch.value === value);
    return 2 * own.filter(({ apart }) => apart).length > own.length;
  }

  return {
    isApart,
    longRun(run) {
      const { value, from, length, before, after } = run;
      const atEdge = before.length < sideSamples || after.length < sideSamples;
      if (value === 0 && (atEdge || length > longestDropout)) return;
      if (stretches.length === mostStretches || !isStuck(run, atEdge)) return;
      const power = Math.min(powerOf(before), powerOf(after));
      stretches.push({ value, from, length, apart: isFarOff(run), power });
    },
    findings(facts) {
      const { min, max, rms } = facts.levels;
      const loud = quiet * quiet * rms * rms;
      const ends = [min, max].filter((value) => !isApart(value));
      const found = stretches.filter(({ value }) => !ends.includes(value));
      return [
        ...report(
          'stuck',
          found.filter(({ value }) => value !== 0),
          facts,
        ),
        ...report(
          'dropout',
          found.filter(({ value, power }) => value === 0 && power >= loud),
          facts,
        ),
      ];
    },
  };
}

/** At an end of the recording there is one side to go by, and no step back. */
function isStuck({ value, length, before, after }: LongRun, atEdge: boolean): boolean {
  const sides = [before, after].filter((side) => side.length === sideSamples);
  if (sides.length === 0) return false;
  const row = stillest.find(([least]) => length >= least);
  if (row === undefined || sides.some((side) => !isMoving(side, row[1]))) return false;
  const courses = sides.map(courseOf);
  if (courses.every((course) => course.turns >= fewestTurns)) return true;
  if (atEdge) return false;
  const largest = Math.max(...courses.map((course) => course.largest));
  const into = Math.abs(value - before[before.length - 1]);
  const out = Math.abs(after[0] - value);
  return Math.max(into, out) > jumping * largest;
}

function report(code: 'stuck' | 'dropout', found: readonly Stretch[], facts: ChannelFacts): Finding[] {
  const samples = found.reduce((sum, { length }) => sum + length, 0);
  if (found.length === 0 || samples > mostShare * facts.samples) return [];
  const [{ value, from, length }] = found;
  const values = {
    value,
    count: found.length,
    times: found.length === 1 ? 'once' : `${grouped(found.length)} times`,
    samples,
    longest: Math.max(...found.map((stretch) => stretch.length)),
    positions: positionsInWords(
      found.map((stretch) => stretch.from),
      found.length,
    ),
  };
  return [finding(code, values, { ...facts.place, from, to: from + length })];
}

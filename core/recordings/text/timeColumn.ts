import { significant } from '../../figures/numbers';
import { type Finding, finding } from '../../findings/finding';
import type { Dialect } from './dialect';
import { isTimestamp } from './timestamp';

/** What the first column is, as far as its name and first cell tell. */
export type FirstColumn =
  | { kind: 'time'; unit: number; resolution: number; stamps: boolean }
  | { kind: 'index' }
  | { kind: 'perhaps-time'; resolution: number }
  | { kind: 'channel' };

const timeName =
  /^((rel(ative)?|elapsed) ?)?(time|zeit|temps|tiempo|tempo|t|timestamp|time ?stamp|date ?time|elapsed|uptime|seconds?|sec|s|millis(econds?)?|msec|ms|micros(econds?)?|usec|us|µs|nanos(econds?)?|ns|minutes?|min)$/i;
const indexName = /^(samples?|sample ?(no|nr|number|index)|index|idx|n|i|no|nr|#|row|count|number)?$/i;

/** Seconds of a unit as headers write it. */
const units: [RegExp, number][] = [
  [/^(s|secs?|seconds?)$/i, 1],
  [/^(ms|msecs?|millis(econds?)?)$/i, 1e-3],
  [/^([uµμ]s|usecs?|micros(econds?)?)$/i, 1e-6],
  [/^(ns|nsecs?|nanos(econds?)?)$/i, 1e-9],
  [/^(min|minutes?)$/i, 60],
  [/^(h|hours?)$/i, 3600],
];

/**
 * The first of several columns is time where it is named so, or holds dates and times; a running number where it is named
 * so or has no name and counts up by one from 0 or 1. Without a name it is also time where it rises by even steps. A
 * column with another name is a channel, however it runs, and so is an only column: a measured ramp must not be eaten.
 */
export function firstColumn({ columns, names, units: unitRow, firstCells, decimal }: Dialect): FirstColumn {
  if (columns < 2) return { kind: 'channel' };
  const resolution = finestResolution(firstCells, decimal);
  if (isTimestamp(firstCells[0])) return { kind: 'time', unit: 1, resolution, stamps: true };
  const name = names?.[0] ?? '';
  const { bare, unit } = parts(name);
  if (bare !== '' && timeName.test(bare)) {
    const given = unitOf(unitRow?.[0] ?? '') ?? unitOf(unit) ?? unitOf(bare) ?? 1;
    return { kind: 'time', unit: given, resolution: given * resolution, stamps: false };
  }
  if (bare === '') return { kind: 'perhaps-time', resolution };
  return indexName.test(bare) ? { kind: 'index' } : { kind: 'channel' };
}

/** `Time [ms]`, `time (ms)`, `time/ms` and `time_ms` as name and unit. */
function parts(name: string): { bare: string; unit: string } {
  const match = /^(.*?)\s*(?:[[(/]\s*([^\])]*?)\s*[\])]?|[_ ]([a-zµμ]{1,8}))$/i.exec(name.trim());
  const unit = match?.[2] ?? match?.[3] ?? '';
  if (match === null || match[1] === '' || unitOf(unit) === null) return { bare: name.trim(), unit: '' };
  return { bare: match[1].trim(), unit };
}

function unitOf(text: string): number | null {
  const bare = text.trim().replace(/^[[(]|[\])]$/g, '');
  return units.find(([pattern]) => pattern.test(bare))?.[1] ?? null;
}

/** What the last printed digit stands for in the cell that has most of them: programs leave out final zeros. */
export function finestResolution(cells: readonly string[], decimal: string): number {
  return Math.min(...cells.filter((cell) => cell !== '').map((cell) => resolutionOf(cell, decimal)));
}

function resolutionOf(cell: string, decimal: string): number {
  const sign = isTimestamp(cell) ? /[.,](\d+)/ : new RegExp(`[${decimal}](\\d*)`);
  const places = sign.exec(cell)?.[1].length ?? 0;
  const exponent = Number(/[eEdD]([+-]?\d+)/.exec(cell)?.[1] ?? 0);
  return Number(`1e${Math.max(-300, Math.min(300, exponent - places))}`);
}

/** How a column runs, gathered row by row. */
export interface Course {
  rows: number;
  first: number;
  last: number;
  smallestStep: number;
  largestStep: number;
  /** Row after the smallest and the largest step, from 0. */
  smallestAt: number;
  largestAt: number;
  /** First row whose value is missing or infinite; null where all are there. */
  brokenAt: number | null;
}

export function newCourse(): Course {
  return {
    rows: 0,
    first: 0,
    last: 0,
    smallestStep: Number.POSITIVE_INFINITY,
    largestStep: Number.NEGATIVE_INFINITY,
    smallestAt: 0,
    largestAt: 0,
    brokenAt: null,
  };
}

/** Adds the next value. */
export function addToCourse(course: Course, value: number): void {
  if (value - value !== 0) {
    course.brokenAt ??= course.rows;
    course.rows++;
    return;
  }
  if (course.rows === 0) course.first = value;
  else {
    const step = value - course.last;
    if (step < course.smallestStep) {
      course.smallestStep = step;
      course.smallestAt = course.rows;
    }
    if (step > course.largestStep) {
      course.largestStep = step;
      course.largestAt = course.rows;
    }
  }
  course.last = value;
  course.rows++;
}

/** Whether every value of a column is one more than that before. */
export function stepsByOne({ smallestStep, largestStep, brokenAt }: Course): boolean {
  return brokenAt === null && smallestStep === 1 && largestStep === 1;
}

/** Whether a column counts 0, 1, 2 … or 1, 2, 3 …. */
export function countsUp(course: Course): boolean {
  return (course.first === 0 || course.first === 1) && stepsByOne(course);
}

/** Doubles tell times apart no better than by this part of them, however many digits are printed. */
export const doubleRounding = 4.5e-16;

/** Whether a column rises by steps that are even to the last printed digit. */
export function risesEvenly(course: Course, printed: number): boolean {
  const { smallestStep, largestStep, brokenAt, first, last } = course;
  const resolution = Math.max(printed, doubleRounding * Math.max(Math.abs(first), Math.abs(last)));
  return (
    brokenAt === null &&
    smallestStep > 0 &&
    largestStep - smallestStep <= 2.001 * resolution &&
    largestStep < 1.5 * smallestStep
  );
}

/**
 * The sample rate of a time column and what is wrong with it. Times are in seconds.
 * @param printed what the last printed digit stands for, in seconds
 */
export function rateOf(
  course: Course,
  printed: number,
  file: string,
): { rate: number | null; findings: Finding[] } {
  const span = course.last - course.first;
  // Steps that are all alike far below the last digit that is seen have more digits, all of them zeros.
  const spread = course.largestStep - course.smallestStep;
  const rounding = doubleRounding * Math.max(Math.abs(course.first), Math.abs(course.last));
  const resolution = Math.max(rounding, spread <= 1e-3 * printed ? spread : printed);
  const period = span / (course.rows - 1);
  const place = (at: number) => ({ file, from: at, to: at + 1 });
  const micros = (seconds: number) => `${significant(seconds * 1e6)} µs`;
  const blocker = (what: string, at: number, cure: string): { rate: null; findings: Finding[] } => ({
    rate: null,
    findings: [finding('uneven-time', { what, cure }, place(at), 'blocker')],
  });
  const { smallestStep, largestStep, smallestAt, largestAt, brokenAt } = course;
  const mend = 'Mend the column, or remove it and give "sampleRate".';
  if (brokenAt !== null) return blocker(`the time at sample ${brokenAt} is missing`, brokenAt, mend);
  if (!(period > 0)) return blocker('the times do not rise', smallestAt, mend);
  const rate = roundest(1 / period, Math.min(0.01, resolution / span));
  if (smallestStep < 0) {
    return blocker(
      `it steps back by ${micros(-smallestStep)} at sample ${smallestAt}`,
      smallestAt,
      'Cut the file there, or record again.',
    );
  }
  // Times printed too coarsely repeat; that alone loses nothing.
  if (smallestStep === 0 && resolution < 0.999 * period) {
    return blocker(
      `the time at sample ${smallestAt} is that of the sample before`,
      smallestAt,
      'Remove the repeated rows, or record again.',
    );
  }
  if (largestStep > 1.5 * period + 1.001 * resolution) {
    // The gap itself stretches the mean period.
    const usual = course.rows > 2 ? (span - largestStep) / (course.rows - 2) : period;
    const lost = significant(largestStep / usual - 1, 3);
    return blocker(
      `a gap of ${micros(largestStep)} before sample ${largestAt}, ${lost} samples too long`,
      largestAt,
      'Cut the file there and use the parts as takes, or record again.',
    );
  }
  const uneven = Math.max(largestStep - period, period - smallestStep);
  if (uneven <= Math.max(2.001 * resolution, 1e-3 * period)) return { rate, findings: [] };
  const what = `steps of ${micros(smallestStep)} to ${micros(largestStep)} about ${micros(period)}, up to ${significant(uneven * rate, 2)} of a sample off`;
  const cure = `The filter takes the samples as evenly spaced at ${significant(rate, 8)} Hz. Take them by a timer, or bring the recording to even steps first.`;
  return { rate, findings: [finding('uneven-time', { what, cure }, place(smallestAt))] };
}

/** The number of fewest digits within a relative distance: rates are round, printed times are not. */
function roundest(value: number, distance: number): number {
  for (let digits = 1; digits <= 15; digits++) {
    const rounded = Number(value.toPrecision(digits));
    if (Math.abs(rounded - value) <= (distance + 1e-12) * value) return rounded;
  }
  return value;
}

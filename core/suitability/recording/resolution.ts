/** How finely a channel is resolved, as far as the samples seen so far tell. */
export interface Resolution {
  add(samples: Float64Array): void;
  /** An upper bound of the step between neighbouring values near the largest ones; Infinity where nothing is known. */
  stepAt(value: number): number;
  /** Pairs of neighbouring samples looked at, those that are equal, and the sum of |difference| over the others. */
  readonly pairs: number;
  readonly equalPairs: number;
  readonly moved: number;
}

/** The first samples are all looked at; then, of each period, so many: enough to meet small steps, for little time. */
const wholly = 16384;
const period = 1024;
const looked = 64;

/** Differences below this part of the values are what single precision leaves of decimal fractions (2^-24 each). */
const rounding = 1 / 2097152;

/** Numbers printed with so many digits, whatever their size, have steps that differ by ten within a decade. */
const decade = 10;
/** Ends of what seven digits are, and how near to a whole number of their last one rounding leaves a value. */
const sevenDigits = 1e6;
const eightDigits = 1e7;
const wholeEnough = 0.02;

/** A-law and µ-law have 16 steps between one power of two and the next (ITU-T G.711). */
const compandedSteps = 16;

/**
 * Of whole numbers and PCM, which are exact, the step is the greatest common divisor of the differences between neighbouring
 * samples. Of others it is the smallest difference of first to third order: on a grid of even steps all are multiples of it;
 * those of a smooth signal without a grid fall off with the order. Only samples of at least a quarter of the largest so far
 * count, because floats and printed numbers are finer near zero.
 * @param even whether the steps are known to be even: PCM. Whole numbers are taken as such too.
 * @param companded true for A-law and µ-law, whose steps grow with the value
 */
export function newResolution(even: boolean, companded: boolean): Resolution {
  let step = Number.POSITIVE_INFINITY;
  let common = 0;
  let base = 0;
  let whole = true;
  let decimals = 0;
  let tried = 0;
  let seen = 0;
  let pairs = 0;
  let equalPairs = 0;
  let moved = 0;

  function look(samples: Float64Array, from: number, to: number): void {
    let before = samples[from];
    let lastFirst = 0;
    let lastSecond = 0;
    /** Samples in a row that are large enough. */
    let large = 0;
    for (let k = from + 1; k < to; k++) {
      const value = samples[k];
      const first = value - before;
      before = value;
      // False for NaN and infinite samples.
      if (first - first !== 0) {
        large = 0;
        continue;
      }
      pairs++;
      if (first === 0) equalPairs++;
      else moved += Math.abs(first);
      if (whole && value !== Math.floor(value)) whole = false;
      if (even || whole) common = commonDivisor(common, Math.abs(first));
      const size = Math.abs(value);
      if (size > 2 * base) {
        base = size;
        step = Number.POSITIVE_INFINITY;
      }
      large = 4 * size >= base ? large + 1 : 0;
      const second = first - lastFirst;
      if (large > 1) note(Math.abs(first));
      if (large > 2) note(Math.abs(second));
      if (large > 3) note(Math.abs(second - lastSecond));
      lastFirst = first;
      lastSecond = second;
    }
  }

  function note(difference: number): void {
    if (difference < step && difference > 2 * rounding * base) step = difference;
  }

  function tryDecimal(value: number): void {
    if (value === 0 || value - value !== 0) return;
    tried++;
    if (hasSevenDigits(Math.abs(value))) decimals++;
  }

  return {
    get pairs() {
      return pairs;
    },
    get equalPairs() {
      return equalPairs;
    },
    get moved() {
      return moved;
    },
    add(samples) {
      for (let from = 0; from < samples.length; from += period) {
        const to = Math.min(samples.length, from + (seen < wholly ? period : looked));
        look(samples, from, to);
        tryDecimal(samples[to - 1]);
        seen += to - from;
      }
    },
    stepAt(value) {
      if (companded) return Math.abs(value) / compandedSteps;
      if (even || whole) return common === 0 ? Number.POSITIVE_INFINITY : common;
      return 2 * decimals < tried ? step : decade * step;
    },
  };
}

/** Euclid's algorithm on numbers that are multiples of a power of two, so that remainders are exact. */
function commonDivisor(known: number, more: number): number {
  const times = more / known;
  if (known > 0 && times === Math.floor(times)) return known;
  let divisor = more;
  for (let rest = known; rest > 0; ) [divisor, rest] = [rest, divisor % rest];
  return divisor;
}

/** Whether a value has seven significant decimal digits at most, give or take what rounding leaves. */
function hasSevenDigits(value: number): boolean {
  let mantissa = value;
  for (let k = 0; k < 40 && mantissa < sevenDigits; k++) mantissa *= 10;
  for (let k = 0; k < 40 && mantissa >= eightDigits; k++) mantissa /= 10;
  return Math.abs(mantissa - Math.round(mantissa)) < wholeEnough;
}

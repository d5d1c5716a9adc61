/** One of the largest values of a channel. */
export interface TopValue {
  value: number;
  /** Samples of exactly this value. */
  count: number;
  /** Times the signal came to it from another value. */
  visits: number;
}

/** The largest distinct values of a channel, largest first, and where the largest was met first. */
export interface TopValues {
  readonly values: readonly TopValue[];
  /** Where the first visits to the largest value began. */
  readonly firsts: readonly number[];
  /** Values below this one need not be counted. */
  readonly least: number;
  /** The signal comes to this value from another; NaN and infinite ones are no values. */
  arrive(value: number, at: number): void;
  /** It is there for so many more samples. */
  stay(samples: number): void;
}

const kept = 5;

/** Below the largest, values closer than this part of them are the same: what rounding makes of one. */
const rounding = 1 / 2097152;

const keptFirsts = 6;

export function newTopValues(): TopValues {
  const values: TopValue[] = [];
  let firsts: number[] = [];
  let least = Number.NEGATIVE_INFINITY;
  /** The entry counted last, if the last sample was kept. */
  let latest: TopValue | null = null;

  /** Where the value stands among those kept, or belongs. */
  function placeOf(value: number): number {
    let place = 0;
    while (place < values.length && values[place].value > value) place++;
    const margin = rounding * Math.abs(value);
    return place > 1 && values[place - 1].value - value <= margin ? place - 1 : place;
  }

  function isAt(place: number, value: number): boolean {
    if (place === values.length) return false;
    const gap = Math.abs(values[place].value - value);
    return gap === 0 || (place > 0 && gap <= rounding * Math.abs(value));
  }

  function insert(value: number, place: number): void {
    if (place === 0) firsts = [];
    values.splice(place, 0, { value, count: 0, visits: 0 });
    if (values.length > kept) values.pop();
    if (values.length === kept) least = values[kept - 1].value;
  }

  return {
    values,
    get firsts() {
      return firsts;
    },
    get least() {
      return least;
    },
    arrive(value, at) {
      const place = placeOf(value);
      latest = null;
      if (place === kept || value - value !== 0) return;
      if (!isAt(place, value)) insert(value, place);
      latest = values[place];
      latest.count++;
      latest.visits++;
      if (place === 0 && firsts.length < keptFirsts) firsts.push(at);
    },
    stay(samples) {
      if (latest !== null) latest.count += samples;
    },
  };
}

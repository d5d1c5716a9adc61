import type { BandFilter } from '../pair/bandFilter';
import { bandPass } from '../pair/bandSignals';
import type { Interval } from '../pair/intervals';

/** Rows over the same n: as they came, in the band and outside it. */
export interface Weighed {
  raw: readonly Float64Array[];
  /** Passed through the band filter; as they came where the error is not weighted to a band. */
  inside: readonly Float64Array[];
  /** What the band filter took off; null where there is none. */
  outside: readonly Float64Array[] | null;
}

/** Passes rows that come block by block through the band that the error is weighted to. */
export interface Weighing {
  /**
   * Begins a new stretch.
   * @returns what has to be brought for it: the stretch with the samples that the band filter looks back on
   */
  begin(stretch: Interval): Interval;
  /**
   * Brings the next samples of every row, equally many each.
   * @returns what can be told of them; null while all of them lie before the stretch. Holds until the next call
   */
  push(rows: readonly Float64Array[]): Weighed | null;
}

/** @param band null where every frequency counts alike */
export function newWeighing(band: BandFilter | null | undefined): Weighing {
  if (!band) {
    return { begin: (stretch) => stretch, push: (rows) => ({ raw: rows, inside: rows, outside: null }) };
  }
  const pass = bandPass(band);
  const { history } = band;
  let past: Float64Array[] = [];
  return {
    begin({ from, to }) {
      past = [];
      return { from: from - history, to };
    },
    push(rows) {
      const joined = rows.map((row, r) => join(past[r], row));
      const { length } = joined[0];
      past = joined.map((row) => row.subarray(Math.max(0, length - history)));
      if (length <= history) return null;
      const inside = pass(joined);
      const outside = inside.map((row, r) => {
        // The band filter delays by half its history; so what it took off is seen as late.
        const late = joined[r].subarray(history / 2);
        return row.map((value, n) => late[n] - value);
      });
      return { raw: joined.map((row) => row.subarray(history)), inside, outside };
    },
  };
}

function join(first: Float64Array | undefined, second: Float64Array): Float64Array {
  const before = first?.length ?? 0;
  const whole = new Float64Array(before + second.length);
  if (first !== undefined) whole.set(first);
  whole.set(second, before);
  return whole;
}

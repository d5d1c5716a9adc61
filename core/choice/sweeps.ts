import type { Generators } from './generators';
import type { Turns } from './turns';

/** Partners of weight above 0 that one pass takes; where there are fewer, the next columns are left as they are. */
const raisedAtOnce = 2;

/** Partners of weight below 0 that one pass takes, likewise. */
export const loweredAtOnce = 3;

/**
 * Moves the pivot on and turns it against all partners, in the rows from `from` up to `to`. Two multiply-adds for each
 * partner and row.
 * @param start first row of the part of T that the rows belong to: what would come from before it is zero
 * @param shift rows that the pivot moves on by
 */
export function sweep(
  { inputs, raising, lowering, width, values }: Generators,
  pivot: number,
  turns: Turns,
  start: number,
  from: number,
  to: number,
  shift: number,
): void {
  // From the end, so that it can be moved where it stands.
  for (let t = to - 1; t >= from; t--) {
    values[t * width + pivot] = t - shift < start ? 0 : values[(t - shift) * width + pivot];
  }
  for (let j = 0; j < raising; j += raisedAtOnce) {
    take(turns, j, Math.min(j + raisedAtOnce, raising));
    raise(values, width, pivot, inputs + j, from, to);
  }
  for (let j = raising; j < raising + lowering; j += loweredAtOnce) {
    take(turns, j, Math.min(j + loweredAtOnce, raising + lowering));
    lower(values, width, pivot, inputs + j, from, to);
  }
}

/** Those of the partners of one pass, and zeros. */
const taken = new Float64Array(2 * loweredAtOnce);

function take(turns: Turns, from: number, to: number): void {
  for (let j = 0; j < taken.length; j++) taken[j] = 2 * from + j < 2 * to ? turns[2 * from + j] : 0;
}

function raise(
  values: Float64Array,
  width: number,
  pivot: number,
  partner: number,
  from: number,
  to: number,
): void {
  const s0 = taken[0];
  const m0 = taken[1];
  const s1 = taken[2];
  const m1 = taken[3];
  for (let row = from * width; row < to * width; row += width) {
    const x = values[row + pivot];
    const y = values[row + partner];
    const z = values[row + partner + 1];
    const turned = x + s0 * y;
    values[row + partner] = y - m0 * x;
    values[row + partner + 1] = z - m1 * turned;
    values[row + pivot] = turned + s1 * z;
  }
}

function lower(
  values: Float64Array,
  width: number,
  pivot: number,
  partner: number,
  from: number,
  to: number,
): void {
  const s0 = taken[0];
  const m0 = taken[1];
  const s1 = taken[2];
  const m1 = taken[3];
  const s2 = taken[4];
  const m2 = taken[5];
  for (let row = from * width; row < to * width; row += width) {
    const y0 = values[row + partner];
    const y1 = values[row + partner + 1];
    const y2 = values[row + partner + 2];
    const x0 = values[row + pivot] + s0 * y0;
    const x1 = x0 + s1 * y1;
    const x2 = x1 + s2 * y2;
    values[row + partner] = y0 - m0 * x0;
    values[row + partner + 1] = y1 - m1 * x1;
    values[row + partner + 2] = y2 - m2 * x2;
    values[row + pivot] = x2;
  }
}

import { fixed, grouped } from '../../core/figures/numbers';
import { minus, plain } from './shown';

/** The smallest step of 1, 2 or 5 times a power of ten of which `span` holds at most `count`. */
export function niceStep(span: number, count: number): number {
  const rough = span / Math.max(1, count);
  if (!(rough > 0) || !Number.isFinite(rough)) return 1;
  const power = 10 ** Math.floor(Math.log10(rough));
  // A hair of slack, so that 0.1 + 0.2 does not turn a step of 0.3 / 3 into 0.2.
  const factor = [1, 2, 5].find((candidate) => candidate * power >= rough * (1 - 1e-9)) ?? 10;
  return factor * power;
}

/** Multiples of a 1-2-5 step from `min` to `max`, both included where they are multiples. */
export function linearTicks(min: number, max: number, count: number): { values: number[]; step: number } {
  const step = niceStep(max - min, count);
  const first = Math.ceil(min / step - 1e-9);
  const last = Math.floor(max / step + 1e-9);
  const values: number[] = [];
  // Whole multiples rather than a running sum; adding 0 turns -0 into 0.
  for (let k = first; k <= last; k++) values.push(Number((k * step).toPrecision(12)) + 0);
  return { values, step };
}

/** Powers of ten, with their multiples by 2 and 5 where `count` leaves room; linear ticks where that gives fewer than two. */
export function logarithmicTicks(min: number, max: number, count: number): number[] {
  if (!(min > 0) || !(max > min)) return min > 0 ? [min] : [];
  const from = Math.floor(Math.log10(min));
  const to = Math.ceil(Math.log10(max));
  const within = (factors: number[], every: number) => {
    const values: number[] = [];
    for (let power = from; power <= to; power++) {
      if (power % every !== 0) continue;
      for (const factor of factors) {
        const value = Number((factor * 10 ** power).toPrecision(3));
        if (value >= min * (1 - 1e-9) && value <= max * (1 + 1e-9)) values.push(value);
      }
    }
    return values;
  };
  const full = within([1, 2, 5], 1);
  if (full.length < 2) return linearTicks(min, max, count).values.filter((value) => value > 0);
  if (full.length <= count) return full;
  for (let every = 1; every <= to - from; every++) {
    const decades = within([1], every);
    if (decades.length <= Math.max(2, count)) return decades.length > 0 ? decades : full.slice(0, 1);
  }
  return full.slice(0, 1);
}

/** A tick's label with the digits its step needs. */
export function tickText(value: number, step: number): string {
  const size = Math.abs(value);
  if (value === 0) return '0';
  if (step < 1e-4 || size >= 1e6) return plain(value, 6);
  return minus(grouped(fixed(value, Math.max(0, -Math.floor(Math.log10(step) + 1e-9)))));
}

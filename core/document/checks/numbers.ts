import type { At, Check } from './check';
import { describe } from './describe';

/** Any finite number; -0 becomes 0. */
export function anyNumber(value: unknown, at: At): number | undefined {
  if (typeof value !== 'number' || !Number.isFinite(value)) {
    return at.report('not-a-number', { got: describe(value) });
  }
  return value === 0 ? 0 : value;
}

/** A number from `min` to `max`, both allowed. */
export function numberIn(min: number, max: number): Check<number> {
  return (value, at) => inRange(anyNumber(value, at), min, max, at);
}

/** A whole number from `min` to `max`, both allowed. */
export function wholeIn(min: number, max: number): Check<number> {
  return (value, at) => {
    const number = anyNumber(value, at);
    if (number === undefined) return undefined;
    return Number.isInteger(number) ? inRange(number, min, max, at) : at.report('not-whole', { got: number });
  };
}

/** A number above 0 and at most `max`. */
export function positiveUpTo(max: number): Check<number> {
  return (value, at) => {
    const number = anyNumber(value, at);
    if (number === undefined) return undefined;
    return number > 0 ? inRange(number, 0, max, at) : at.report('not-positive', { got: number });
  };
}

function inRange(number: number | undefined, min: number, max: number, at: At): number | undefined {
  if (number === undefined || (number >= min && number <= max)) return number;
  const open = number < min && max >= Number.MAX_SAFE_INTEGER;
  return at.report(open ? 'below-range' : 'out-of-range', { got: number, min, max });
}

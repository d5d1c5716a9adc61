import type { At, Check } from './check';
import { describe } from './describe';

/** Characters of a title or a name at most. */
export const longestLabel = 200;

/** Control characters, line and paragraph separators, and marks that turn the writing direction of what follows. */
export const controlCharacters = /[\p{Cc}\u2028\u2029\u202a-\u202e\u2066-\u2069]/u;

/** A text that is not empty. */
export function text(value: unknown, at: At): string | undefined {
  if (typeof value !== 'string') return at.report('not-text', { got: describe(value) });
  return value === '' ? at.report('empty-text') : value;
}

/** A title or a name: one line of up to {@link longestLabel} characters. */
export function label(value: unknown, at: At): string | undefined {
  const given = text(value, at);
  if (given === undefined) return undefined;
  const characters = [...given].length;
  if (characters > longestLabel) return at.report('text-too-long', { got: characters, max: longestLabel });
  return controlCharacters.test(given) ? at.report('control-character', { got: describe(given) }) : given;
}

/** True or false. */
export function trueOrFalse(value: unknown, at: At): boolean | undefined {
  return typeof value === 'boolean' ? value : at.report('not-true-or-false', { got: describe(value) });
}

/** One of the values listed. */
export function oneOf<T extends string | number>(allowed: readonly T[]): Check<T> {
  return (value, at) =>
    allowed.find((candidate) => candidate === value) ??
    at.report('not-one-of', { got: describe(value), allowed: allowed.join(', ') });
}

import { type At, type Check, newAt } from './check';
import { describe } from './describe';
import { shortQuote } from './path';

/** The keys of one object, each asked for once; what was not asked for is an unknown key. */
export interface Keys {
  readonly at: At;
  /** The value of a key; the fallback where it is left out or wrong. */
  optional<T>(name: string, check: Check<T>, fallback: T): T;
  /** The value of a key that has no default; undefined where it is left out or wrong. */
  required<T>(name: string, check: Check<T>): T | undefined;
  /** An object of keys that all have defaults, and may be left out as a whole. */
  section<T>(name: string, read: (keys: Keys) => T): T;
}

/** An object whose keys `read` takes. Unknown keys are notes. */
export function objectOf<T>(read: (keys: Keys) => T | undefined): Check<T> {
  return (value, at) => {
    if (typeof value !== 'object' || value === null || Array.isArray(value)) {
      return at.report('not-an-object', { got: describe(value) });
    }
    return readKeys(value as Readonly<Record<string, unknown>>, at, read);
  };
}

/** What `read` makes of the keys that are given and the defaults of the others; wrong values count as left out. */
export function withDefaults<T>(read: (keys: Keys) => T, given: Readonly<Record<string, unknown>> = {}): T {
  return readKeys(given, newAt([]), read);
}

function readKeys<T>(entries: Readonly<Record<string, unknown>>, at: At, read: (keys: Keys) => T): T {
  const known: string[] = [];
  const take = (name: string): unknown => {
    known.push(name);
    return Object.hasOwn(entries, name) ? entries[name] : undefined;
  };
  const result = read({
    at,
    optional(name, check, fallback) {
      const value = take(name);
      const checked = value === undefined ? undefined : check(value, at.inside(name));
      return checked === undefined ? fallback : checked;
    },
    required(name, check) {
      const value = take(name);
      return value === undefined ? at.inside(name).report('missing-key') : check(value, at.inside(name));
    },
    section(name, readSection) {
      const value = take(name);
      const checked = value === undefined ? undefined : objectOf(readSection)(value, at.inside(name));
      return checked ?? withDefaults(readSection);
    },
  });
  for (const name of Object.keys(entries)) {
    if (!known.includes(name)) {
      at.inside(name).note('unknown-key', { name: shortQuote(name), known: known.join(', ') });
    }
  }
  return result;
}

import type { Severity } from './finding';

/** A row of the table of sentences: what was found, what was expected, what to do. */
export interface Sentence {
  severity: Severity;
  /** English template; `{name}` is replaced by the finding's value of that name. */
  says: string;
}

/** Keeps the keys of a table literal while it checks its rows. */
export function table<T extends Record<string, Sentence>>(rows: T): T {
  return rows;
}

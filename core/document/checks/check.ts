import { type Finding, type FindingValue, finding } from '../../findings/finding';
import type { FindingCode } from '../../findings/sentences';
import { type Path, pathInWords } from './path';

/** A place in the document that can report what is wrong with its value. */
export interface At {
  readonly path: Path;
  /** Adds a blocker; its `key` is filled in. Returns undefined, so that a check can return what it reports. */
  report(code: FindingCode, values?: Readonly<Record<string, FindingValue>>): undefined;
  /** Adds a note at this place. */
  note(code: FindingCode, values: Readonly<Record<string, FindingValue>>): void;
  inside(key: string | number): At;
}

/** Turns a value of the parsed text into what the document holds; undefined where it reported why it cannot. */
export type Check<T> = (value: unknown, at: At) => T | undefined;

/** A check of one item of a list, by its index. */
export type ItemCheck<T> = (value: unknown, at: At, index: number) => T | undefined;

/** A place whose findings go to the end of `findings`. */
export function newAt(findings: Finding[], path: Path = []): At {
  const add = (code: FindingCode, values: Readonly<Record<string, FindingValue>>) => {
    findings.push(finding(code, { key: pathInWords(path), ...values }, { path }));
  };
  return {
    path,
    report(code, values = {}) {
      add(code, values);
      return undefined;
    },
    note: add,
    inside: (key) => newAt(findings, [...path, key]),
  };
}

/** The check, with null for null: where null stands for "left out". */
export function orNull<T>(check: Check<T>): Check<T | null> {
  return (value, at) => (value === null ? null : check(value, at));
}

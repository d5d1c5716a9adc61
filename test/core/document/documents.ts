import { expect } from 'vitest';
import type { PairingDocument } from '../../../core/document/pairingDocument';
import { readDocument } from '../../../core/document/readDocument';
import { say } from '../../../core/findings/say';

export type Entry = Record<string, unknown>;

/** A document with only the keys that have no default. */
export function minimal(changes: Entry = {}): Entry {
  return { pairing: 1, job: 'cancel', takes: [take()], ...changes };
}

export function take(changes: Entry = {}): Entry {
  return {
    inputs: [{ file: 'belt.csv', channel: 'frame' }],
    desired: { file: 'belt.csv', channel: 'cell' },
    ...changes,
  };
}

export function read(document: unknown) {
  return readDocument(JSON.stringify(document));
}

/** The document, which must have no findings at all. */
export function readClean(document: unknown): PairingDocument {
  const { document: found, findings } = read(document);
  expect(findings.map(say)).toEqual([]);
  return found!;
}

/** `code at path` of every finding. */
export function problems(document: unknown): string[] {
  const { findings } = read(document);
  for (const found of findings) {
    expect(say(found), 'every value of the sentence is given').not.toMatch(/\{\w+\}/);
    expect(found.path, 'every finding has a place').toBeDefined();
  }
  return findings.map(({ code, path }) => `${code} at ${path?.join('.')}`);
}

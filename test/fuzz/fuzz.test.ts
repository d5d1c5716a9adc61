import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import { bundleFuzz, fuzzFolder } from './bundle';
import type { Surroundings } from './life';
import type { Planted } from './planted';
import { mostMemory, runFuzz } from './runFuzz';

// The same inputs every time; `npm run fuzz` draws others.

const seed = 1;
const inputs = 20_000;

/** Milliseconds for an input; more than a loaded machine should need for the slowest. */
const patience = 10_000;

let surroundings: Surroundings;

beforeAll(async () => {
  surroundings = { bundle: await bundleFuzz(), folder: fuzzFolder, patience, attempts: 1 };
});

describe('hostile files', () => {
  it(`are told in findings, ${inputs.toLocaleString('en')} of them`, { timeout: 300_000 }, async () => {
    const { tally, failures, restarts } = await runFuzz({ seed, from: 0, to: inputs }, surroundings);
    expect(failures).toEqual([]);
    expect(tally.inputs).toBe(inputs);
    expect(restarts).toBe(0);
    expect(tally.peak).toBeLessThanOrEqual(mostMemory);
    // Inputs reach both sides of every reader, and most of what each can find.
    for (const accepted of ['recording: opened', 'document: read', 'taps: read', 'mark: mark']) {
      expect(tally.codes[accepted], accepted).toBeGreaterThan(inputs / 100);
    }
    for (const refused of [
      'recording: not-a-number-cell',
      'document: not-one-of',
      'taps: not-taps',
      'mark: no mark',
    ]) {
      expect(tally.codes[refused], refused).toBeGreaterThan(inputs / 200);
    }
    expect(Object.keys(tally.codes).length).toBeGreaterThan(55);
  });
});

describe('a run', () => {
  const run = (what: Planted, milliseconds: number) =>
    runFuzz({ seed, from: 0, to: 6, plant: { at: 3, what } }, { ...surroundings, patience: milliseconds });

  const cases: [Planted, RegExp][] = [
    ['throws', /^TypeError: planted/],
    ['hangs', /^no end after 2000 ms/],
    ['holds memory', /^inputs took \d+ MiB/],
    ['runs out of memory', /^ended with .*heap/s],
  ];
  it.each(cases)('finds, names and keeps an input whose reader %s, and goes on', async (what, told) => {
    const { tally, failures, restarts } = await run(what, what === 'hangs' ? 2000 : patience);
    expect(failures).toMatchObject([{ seed, number: 3, fault: expect.stringMatching(told) }]);
    expect(restarts).toBe(0);
    expect(tally.inputs).toBeGreaterThanOrEqual(2);
    expect(readFileSync(`${failures[0].file}.txt`, 'utf8')).toMatch(/^seed 1, input 3\n/);
  });
});

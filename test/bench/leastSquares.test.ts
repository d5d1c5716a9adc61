import { execFileSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { beforeAll, describe, expect, it } from 'vitest';
import ideals from '../../media/bench/ideal.json';
import { needs, python } from '../support/programs';
import { benchScenarios } from './bench';

interface Figures {
  nmseDb: number;
  takes: { name: string; nmseDb: number }[];
}

const path = (name: string) => fileURLToPath(new URL(name, import.meta.url));

describe.skipIf(!needs('scipy'))('SciPy’s dense least squares on the files as they are', () => {
  const scenarios = benchScenarios();
  let figures: Record<string, Figures>;

  beforeAll(() => {
    const documents = scenarios.map(({ document }) => path(`../../media/bench/${document}`));
    const options = { encoding: 'utf8', maxBuffer: 1 << 24 } as const;
    figures = JSON.parse(execFileSync(python, [path('leastSquares.py'), ...documents], options));
  });

  it.each(scenarios)('comes within 0.3 dB of the ideal of $document', ({ document }) => {
    const { idealNmseDb, takes } = ideals[document as keyof typeof ideals];
    const designed = figures[document];
    expect(Math.abs(designed.nmseDb - idealNmseDb)).toBeLessThan(0.3);
    designed.takes.forEach(({ name, nmseDb }, t) => {
      expect(takes[t].name).toBe(name);
      expect(Math.abs(nmseDb - takes[t].idealNmseDb)).toBeLessThan(0.3);
    });
  });

  it.each(scenarios)('stays below the limit of $document in every take', ({ document, heldOutLimit }) => {
    for (const { nmseDb } of figures[document].takes) expect(nmseDb).toBeLessThan(heldOutLimit - 1);
  });
});

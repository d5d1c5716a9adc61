import { execFileSync } from 'node:child_process';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { emptyFolder, tapwright } from '../support/cli';
import { needs } from '../support/programs';
import { normals } from '../support/random';

// Number formats, shapes and languages through the command line, on a noisy path of 20 taps.

const path = Array.from({ length: 20 }, (_, k) => Math.exp(-(((k - 9.5) / 4) ** 2)));
const total = path.reduce((a, b) => a + b, 0);

function folderWith(): string {
  const folder = emptyFolder();
  const white = normals(5, 6000);
  const x = white.slice();
  for (let n = 2; n < x.length; n++) x[n] += 1.6 * x[n - 1] - 0.8 * x[n - 2];
  const noise = normals(6, 6000);
  const rows = Array.from(x, (value, n) => {
    let d = 0.05 * noise[n];
    for (let k = 0; k < path.length; k++) d += (path[k] / total) * (x[n - k] ?? 0);
    return `${(value / 64).toFixed(6)},${(d / 64).toFixed(6)}`;
  });
  writeFileSync(join(folder, 'path.csv'), `x,d\n${rows.join('\n')}\n`);
  return folder;
}

interface Taps {
  coefficients: number[][];
  heldOut: { nmseDb: number };
  arithmetic: { values: number[][]; fractionBits: number; quantisationLossDb: number; outputErrorDb: number };
  shape: {
    gain: { asked: number; taps: number[]; target: number[] } | null;
    prices: { without: string; priceDb: number }[];
  } | null;
  words: {
    table: { word: number; rounding: string; heldOutNmseDb: number; outputErrorDb: number }[];
    smallestWithinLimit: number | null;
    shares: Record<string, { outputErrorDb: number }>;
  };
  cost: { macsPerSample: number; cyclesPerSample: number; coefficientBytes: number };
  findings: { code: string }[];
}

const folder = folderWith();

function design(
  change: { filter?: object; arithmetic?: object; write?: object; limits?: object } = {},
): Taps {
  const track = (channel: string) => ({ file: 'path.csv', channel });
  const document = {
    pairing: 1,
    title: 'Path',
    job: 'identify',
    sampleRate: 8000,
    takes: [
      {
        inputs: [track('x')],
        desired: track('d'),
        fit: { from: 0, to: 0.5 },
        heldOut: { from: 0.5, to: 0.75 },
      },
    ],
    filter: { length: 20, ...change.filter },
    arithmetic: { input: { fullScale: 1 }, output: { fullScale: 1 }, ...change.arithmetic },
    write: { symbol: 'path', ...change.write },
    limits: change.limits ?? {},
  };
  writeFileSync(join(folder, 'path.pairing.json'), JSON.stringify(document));
  const { status, err } = tapwright(folder, 'design', 'path.pairing.json');
  expect(err.replace(/^.*: (note|warning): .*\n/gm, '')).toBe('');
  expect(status).toBe(0);
  expect(tapwright(folder, 'check', 'path.pairing.json').status).toBe(0);
  return JSON.parse(readFileSync(join(folder, 'generated', 'path.taps.json'), 'utf8'));
}

describe('shapes', () => {
  it('even: taps and integers mirror each other, and the price on a symmetric path is small', () => {
    const { coefficients, arithmetic, shape, cost } = design({ filter: { symmetry: 'even' } });
    expect([...coefficients[0]].reverse()).toEqual(coefficients[0]);
    expect([...arithmetic.values[0]].reverse()).toEqual(arithmetic.values[0]);
    expect(shape?.prices.map(({ without }) => without)).toEqual(['shape']);
    // The path is symmetric: what is lost is the fit to noise, which is a gain.
    expect(Math.abs(shape?.prices[0].priceDb ?? 9)).toBeLessThan(0.1);
    expect(cost.macsPerSample).toBe(10);
  });

  it('odd: the price on a symmetric path is the whole filter', () => {
    const { arithmetic, shape } = design({ filter: { symmetry: 'odd', length: 21 } });
    const [row] = arithmetic.values;
    expect(row.map((_, k) => 0 - row[20 - k])).toEqual(row.map((v) => v + 0));
    expect(row[10]).toBe(0);
    expect(shape?.prices[0].priceDb).toBeGreaterThan(10);
  });

  it('a gain of 1 at 0 Hz is exact in the integers, with and without symmetry', () => {
    for (const symmetry of ['none', 'even']) {
      const { coefficients, arithmetic, shape, findings } = design({
        filter: { symmetry, fixedGain: { frequency: 0, gain: 1 } },
      });
      expect(coefficients[0].reduce((a, b) => a + b, 0)).toBeCloseTo(1, 12);
      const sum = arithmetic.values[0].reduce((a, b) => a + b, 0);
      expect(sum).toBe(2 ** arithmetic.fractionBits);
      expect(shape?.gain?.target).toEqual([1]);
      expect(findings).toEqual([]);
      const price = shape?.prices.find(({ without }) => without === 'gain')?.priceDb;
      expect(Math.abs(price ?? 9)).toBeLessThan(0.5);
    }
  });

  it('says so where the integers cannot have the gain', () => {
    const { shape, findings } = design({ filter: { fixedGain: { frequency: 1000, gain: 0.7 } } });
    expect(findings.map(({ code }) => code)).toEqual(['gain-not-exact']);
    expect(shape?.gain?.taps[0]).toBeCloseTo(0.7, 10);
    expect(shape?.gain?.target[0]).toBeCloseTo(0.7, 3);
  });
});

describe('word lengths', () => {
  it('lists every word with both roundings; error-aware loses less, and 6 dB come with each bit', () => {
    const { words } = design({ limits: { quantisationLoss: 1 } });
    const error = (word: number, rounding: string) =>
      words.table.find((row) => row.word === word && row.rounding === rounding)?.outputErrorDb ?? 0;
    expect(words.table.length).toBe(10);
    // A resonant input, on which plain rounding of 8 bits loses several decibels more (common practice: 4 to 15).
    expect(error(8, 'nearest') - error(8, 'error-aware')).toBeGreaterThan(4);
    expect(error(8, 'nearest') - error(12, 'nearest')).toBeGreaterThan(18);
    expect(words.smallestWithinLimit).not.toBeNull();
    // The inputs' and the output's rounding is all that is left with long taps.
    const power = (db: number) => 10 ** (db / 10);
    const rest = power(words.shares.input.outputErrorDb) + power(words.shares.output.outputErrorDb);
    expect(10 * Math.log10(rest)).toBeCloseTo(error(32, 'nearest'), 0);
  });

  it('counts cycles and bytes', () => {
    const { cost } = design({ arithmetic: { word: 12, cyclesPerMac: 2.5 } });
    expect(cost).toMatchObject({ macsPerSample: 20, cyclesPerSample: 50, coefficientBytes: 40 });
  });
});

describe.skipIf(!needs('gcc'))('the vectors of the whole design', () => {
  it.each([
    ['saturates', { word: 16, output: { word: 8, fullScale: 0.01 } }],
    [
      'wraps in accumulator and output',
      { word: 16, accumulator: 24, overflow: 'wrap', output: { word: 8, fullScale: 0.01 } },
    ],
  ])('come out of the reference in C where it %s', (_, arithmetic) => {
    design({ arithmetic, write: { languages: ['c-source'] } });
    const generated = join(folder, 'generated');
    writeFileSync(
      join(generated, 'main.c'),
      `#include <stdio.h>
#include "path_filter.h"
#include "path_vectors.h"
int main(void)
{
    path_state state;
    int n, wrong = 0;
    path_reset(&state);
    for (n = 0; n < PATH_VECTOR_SAMPLES; n++)
        if (path_step(&state, path_input + n) != path_expected[n]) wrong++;
    printf("%d", wrong);
    return 0;
}
`,
    );
    execFileSync(
      'gcc',
      ['-std=c99', '-Wall', '-Wextra', '-Werror', '-pedantic', 'main.c', 'path_filter.c', '-o', 'main'],
      {
        cwd: generated,
      },
    );
    expect(execFileSync(join(generated, 'main'), { encoding: 'utf8' })).toBe('0');
  });
});

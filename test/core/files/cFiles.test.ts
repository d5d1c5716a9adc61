import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { cFilterHeader, cFilterSource } from '../../../core/files/cFilter';
import { cTaps } from '../../../core/files/cTaps';
import { cVectors } from '../../../core/files/cVectors';
import { numberType } from '../../../core/files/numberTypes';
import { signalWords } from '../../../core/files/signalWords';
import { hostileNames } from '../../support/hostileNames';
import { needs } from '../../support/programs';
import { type SampleOptions, sampleResult } from '../../support/sampleResult';
import { floatProgram, integerProgram, referenceProgram } from '../../support/vectorProgram';

const mark = { document: 'belt.pairing.json', digest: 'a'.repeat(64) };

const formats: [string, SampleOptions][] = [
  ['16 bits', {}],
  ['16 bits, oldest-first', { order: 'oldest-first' }],
  ['8 bits', { word: 8, inputWord: 8, outputWord: 8, accumulator: 24 }],
  ['12 bits', { word: 12, inputWord: 12, outputWord: 12, accumulator: 32 }],
  ['24 bits', { word: 24, inputWord: 24, outputWord: 24, accumulator: 56 }],
  ['32 bits, an accumulator of 64 that wraps', { word: 32, inputWord: 32, outputWord: 32, accumulator: 64 }],
  [
    'an accumulator that is too narrow and saturates',
    { accumulator: 28, accumulatorOverflow: 'saturate', outputWord: 12 },
  ],
  ['an accumulator that is too narrow and wraps', { accumulator: 28, overflow: 'wrap', outputWord: 12 }],
  ['an output that wraps', { gain: 40, overflow: 'wrap' }],
  ['no fraction bits', { word: 8, gain: 200, job: 'equalise', inputs: ['tube'] }],
  ['one tap', { length: 1, delay: -7, job: 'identify' }],
];

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'taps-'));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** Builds and runs a program beside the headers of a result; returns what it prints. */
function run(options: SampleOptions, program: string, compiler: 'gcc' | 'g++'): string {
  const result = sampleResult(options);
  writeFileSync(join(folder, 'belt_taps.h'), cTaps(result, mark));
  writeFileSync(join(folder, 'belt_vectors.h'), cVectors(result, mark));
  const source = compiler === 'gcc' ? 'main.c' : 'main.cpp';
  writeFileSync(join(folder, source), program);
  const standard = compiler === 'gcc' ? '-std=c99' : '-std=c++11';
  const flags = [standard, '-Wall', '-Wextra', '-Werror', '-pedantic', '-ffp-contract=off'];
  execFileSync(compiler, [...flags, source, '-o', 'program'], { cwd: folder });
  return execFileSync(join(folder, 'program'), { encoding: 'utf8' });
}

describe.skipIf(!needs('gcc'))('the C headers in a C99 program (gcc)', () => {
  it.each(formats)('reproduce the big-integer vectors: %s', (_, options) => {
    expect(run(options, integerProgram, 'gcc')).toMatch(/ 0\n$/);
  });

  it.each(['float32', 'float64'] as const)('reproduce the vectors in %s', (word) => {
    const program = floatProgram(word === 'float32' ? 'float' : 'double');
    expect(run({ word }, program, 'gcc')).toBe('0.25 0\n');
  });

  it('fail where one expected sample is off by one', () => {
    const result = sampleResult();
    result.vectors.expected[100] += 1;
    writeFileSync(join(folder, 'belt_taps.h'), cTaps(result, mark));
    writeFileSync(join(folder, 'belt_vectors.h'), cVectors(result, mark));
    writeFileSync(join(folder, 'main.c'), integerProgram);
    execFileSync('gcc', ['-std=c99', 'main.c', '-o', 'program'], { cwd: folder });
    expect(() => execFileSync(join(folder, 'program'), { stdio: 'pipe' })).toThrow();
  });

  it.each(hostileNames)('compile with every name being %j', (hostile) => {
    expect(run(allNamed(hostile), integerProgram, 'gcc')).toMatch(/ 0\n$/);
  });
});

/** Builds the reference source as one unit and a program that streams the vectors through it as another. */
function runReference(options: SampleOptions, compiler: 'gcc' | 'g++'): string {
  const result = sampleResult({ ...options, languages: ['c-source'] });
  const [standard, extension] = compiler === 'gcc' ? ['-std=c99', 'c'] : ['-std=c++11', 'cpp'];
  const files = {
    'belt_taps.h': cTaps(result, mark),
    'belt_vectors.h': cVectors(result, mark),
    'belt_filter.h': cFilterHeader(result, mark),
    [`belt_filter.${extension}`]: cFilterSource(result, mark),
    [`main.${extension}`]: referenceProgram(numberType(signalWords(result.document).input).c),
  };
  for (const [name, text] of Object.entries(files)) writeFileSync(join(folder, name), text);
  const flags = [standard, '-Wall', '-Wextra', '-Werror', '-pedantic', '-Wconversion', '-ffp-contract=off'];
  const sanitised = ['-fsanitize=undefined', '-fno-sanitize-recover=all'];
  const sources = [`belt_filter.${extension}`, `main.${extension}`];
  execFileSync(compiler, [...flags, ...sanitised, ...sources, '-o', 'program'], { cwd: folder });
  return execFileSync(join(folder, 'program'), { encoding: 'utf8' });
}

describe.skipIf(!needs('gcc'))('the reference in C', () => {
  const both: [string, SampleOptions][] = [
    ...formats,
    ['float32', { word: 'float32' }],
    ['float64', { word: 'float64', order: 'oldest-first' }],
    [
      'an accumulator of 64 bits that saturates',
      { word: 32, inputWord: 32, outputWord: 32, accumulator: 64, accumulatorOverflow: 'saturate' },
    ],
  ];

  it.each(both)('puts out the vectors without undefined behaviour (gcc): %s', (_, options) => {
    expect(runReference(options, 'gcc')).toBe('0 wrong\n');
  });

  it.skipIf(!needs('g++')).each(both.filter((_, i) => i % 4 === 0))('and as C++ (g++): %s', (_, options) => {
    expect(runReference(options, 'g++')).toBe('0 wrong\n');
  });
});

describe.skipIf(!needs('gcc'))('attributes of the arrays', () => {
  it('reach the compiler: alignment and section are as asked', () => {
    const attributes = {
      cBefore: '__attribute__((aligned(64)))',
      cAfter: '__attribute__((section(".belt")))',
      rust: '',
    };
    expect(run({ attributes }, integerProgram, 'gcc')).toMatch(/ 0\n$/);
    const symbols = execFileSync('objdump', ['-t', '-j', '.belt', 'program'], {
      cwd: folder,
      encoding: 'utf8',
    });
    expect(symbols).toMatch(/belt_taps/);
    expect(Number.parseInt(/^([0-9a-f]+).*belt_taps$/m.exec(symbols)?.[1] ?? '1', 16) % 64).toBe(0);
  });
});

describe.skipIf(!needs('g++'))('the C headers in a C++11 program (g++)', () => {
  it.each(formats.filter((_, i) => i % 3 !== 1))('reproduce the big-integer vectors: %s', (_, options) => {
    expect(run(options, integerProgram, 'g++')).toMatch(/ 0\n$/);
  });

  it('reproduce the vectors in float32', () => {
    expect(run({ word: 'float32' }, floatProgram('float'), 'g++')).toBe('0.25 0\n');
  });

  it.each(hostileNames.slice(0, 3))('compile with every name being %j', (hostile) => {
    expect(run(allNamed(hostile), integerProgram, 'g++')).toMatch(/ 0\n$/);
  });
});

function allNamed(text: string): SampleOptions {
  return { title: text, file: text, take: text, inputs: [text, text], desired: text };
}

describe('SYMBOL_taps.h', () => {
  it.each(hostileNames)(
    'is printable ASCII on lines without a final backslash, whatever %j does',
    (hostile) => {
      const text = cTaps(sampleResult(allNamed(hostile)), { document: hostile, digest: mark.digest });
      expect(text).toMatch(/^[\n -~]*$/);
      expect(text).not.toMatch(/\\\n|\?\?|\t/);
      // As many comments open as close: none was closed or opened by a name.
      expect(text.match(/\*\//g)?.length).toBe(text.match(/\/\*/g)?.length);
    },
  );

  it('holds what the firmware needs as macros', () => {
    const text = cTaps(sampleResult({ job: 'equalise', inputs: ['tube'], delay: 12 }), mark);
    const macro = (name: string) => new RegExp(`#define BELT_${name} +(.*?) /\\*`).exec(text)?.[1];
    expect(macro('SAMPLE_RATE')).toBe('2000.0');
    expect(macro('LENGTH')).toBe('64');
    expect(macro('INPUTS')).toBe('1');
    expect(macro('DELAY')).toBe('12');
    expect(macro('FRACTION_BITS')).toBe('15');
    expect(macro('ACCUMULATOR_BITS')).toBe('40');
    expect(macro('INPUT_MEANS')).toBe('{ 2048 }');
    expect(macro('DESIRED_MEAN')).toBe('6400');
    expect(macro('INPUT_COUNTS_PER_UNIT')).toBe('{ 8192.0 }');
    expect(macro('OUTPUT_COUNTS_PER_UNIT')).toBe('512.0');
    expect(macro('NEWEST_FIRST')).toBe('1');
  });

  it('leaves the desired mean out where it stays in the desired signal or no mean is taken off', () => {
    expect(cTaps(sampleResult(), mark)).not.toContain('DESIRED_MEAN');
    const raw = cTaps(sampleResult({ job: 'identify', removeMean: false }), mark);
    expect(raw).not.toContain('DESIRED_MEAN');
    expect(raw).toContain('#define BELT_INPUT_MEANS            { 0, 0 }');
  });

  it('writes negative delays in brackets and holds words in the smallest type', () => {
    const text = (options: SampleOptions) => cTaps(sampleResult(options), mark);
    expect(text({ job: 'identify', delay: -7 })).toContain('BELT_DELAY                  (-7)');
    const type = (word: SampleOptions['word']) =>
      /static const (\w+)/.exec(text({ word, accumulator: 64 }))?.[1];
    expect(
      [8, 12, 16, 24, 32, 'float32', 'float64'].map((word) => type(word as SampleOptions['word'])),
    ).toEqual(['int8_t', 'int16_t', 'int16_t', 'int32_t', 'int32_t', 'float', 'double']);
  });
});

describe('SYMBOL_vectors.h', () => {
  it('writes the lowest 32-bit integer so that no compiler takes it for an unsigned number', () => {
    const text = cVectors(sampleResult({ word: 32, inputWord: 32, accumulator: 64 }), mark);
    expect(text).toContain('(-2147483647 - 1), 2147483647,');
    expect(text).not.toContain('-2147483648');
  });
});

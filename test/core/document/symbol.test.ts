import { spawnSync } from 'node:child_process';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { keywords } from '../../../core/document/keywords';
import { defaultSymbol, symbolFault } from '../../../core/document/symbol';
import { needs } from '../../support/programs';

describe('a symbol', () => {
  it.each([
    ['belt', null],
    ['Belt_2x', null],
    ['x', null],
    ['x'.repeat(63), null],
    ['integer', null],
    ['', 'form'],
    ['2belt', 'form'],
    ['belt-2', 'form'],
    ['belt 2', 'form'],
    ['bélt', 'form'],
    ['belt\n', 'form'],
    ['x'.repeat(64), 'long'],
    ['int', 'keyword'],
    ['class', 'keyword'],
    ['xor_eq', 'keyword'],
    ['_belt', 'reserved'],
    ['_Belt', 'reserved'],
    ['__belt', 'reserved'],
    ['belt__2', 'reserved'],
    ['belt_', 'reserved'],
  ])('%j: %s', (name, fault) => {
    expect(symbolFault(name)).toBe(fault);
  });

  describe.skipIf(!needs('gcc'))('against the compiler', () => {
    const compiles = (name: string, language: string) =>
      spawnSync('gcc', ['-x', ...language.split(' '), '-fsyntax-only', '-w', '-'], {
        input: `int ${name} = 0;\n`,
      }).status === 0;

    it('every keyword is none that C and C++ both take', () => {
      const taken = keywords.filter(
        (name) => compiles(name, 'c -std=c2x') && compiles(name, 'c++ -std=c++20'),
      );
      // Not in every gcc yet (C23), or in C alone.
      expect(taken.filter((name) => !name.startsWith('typeof'))).toEqual([]);
    });

    it('other symbols compile', () => {
      for (const name of ['belt', 'Belt_2x', 'integer', 'filter', 'x'.repeat(63)]) {
        expect(compiles(name, 'c -std=c99') && compiles(name, 'c++ -std=c++17')).toBe(true);
      }
    });
  });
});

describe('a symbol from a title', () => {
  it.each([
    ['Checkweigher belt', 'checkweigher_belt'],
    ['  Valve: current → flow (2) ', 'valve_current_flow_2'],
    ['Förderband Größe', 'forderband_gro_e'],
    ['3rd try', 'filter_3rd_try'],
    ['', 'filter'],
    ['秤', 'filter'],
    ['Double', 'double_filter'],
    ['__init__', 'init'],
    ['x'.repeat(200), 'x'.repeat(40)],
    [`${'x'.repeat(39)} y`, 'x'.repeat(39)],
  ])('%j gives %s', (title, symbol) => {
    expect(defaultSymbol(title)).toBe(symbol);
  });

  it('is always a symbol', () => {
    const title = fc.oneof(fc.string({ unit: 'grapheme' }), fc.constantFrom(...keywords));
    fc.assert(
      fc.property(title, (given) => symbolFault(defaultSymbol(given)) === null),
      { numRuns: 1000, seed: 1 },
    );
  });
});

import { describe, expect, it } from 'vitest';
import { PairingIndex } from '../../../extension/beside/pairingIndex';
import { entryOf, viewOf } from './entries';

const of = (document: string, root: string, folder: string) => ({
  ...entryOf(document, viewOf({ tapsFile: `${folder}/belt.taps.json`, others: [`${folder}/belt_taps.h`] })),
  root,
  folder,
});

describe('the index of pairings', () => {
  const index = new PairingIndex();
  for (const entry of [of('a', 'one', 'left'), of('b', 'one', 'right/in'), of('c', 'two', 'right')])
    index.put(entry);
  const names = (entries: { document: string }[]) => entries.map(({ document }) => document);

  it('finds the nearest of a symbol first, of the same workspace folder before others', () => {
    expect([...index.symbols()]).toEqual(['belt']);
    expect(names(index.bySymbol('belt', 'one', 'right/in/main.c'))).toEqual(['b', 'a', 'c']);
    expect(names(index.bySymbol('belt', 'one', 'left/main.c'))[0]).toBe('a');
    expect(names(index.bySymbol('belt', 'two', 'main.c'))[0]).toBe('c');
    expect(index.bySymbol('valve', 'one', 'x')).toEqual([]);
  });

  it('finds the pairing that a file was written from', () => {
    expect(index.byOutput('one', 'left/belt_taps.h')?.document).toBe('a');
    expect(index.byOutput('one', 'left/belt.taps.json')?.document).toBe('a');
    expect(index.byOutput('two', 'left/belt_taps.h')).toBeUndefined();
  });

  it('finds what hangs on a file, or on a folder', () => {
    expect(names(index.hangingOn('one', 'fir/slow.csv'))).toEqual(['a', 'b']);
    expect(names(index.hangingOn('one', 'left/a'))).toEqual(['a']);
    expect(names(index.hangingBelow('one', 'right'))).toEqual(['b']);
    expect(index.hangingBelow('one', 'righ')).toEqual([]);
  });

  it('follows what is put and removed', () => {
    index.put(entryOf('d', viewOf({ symbol: 'valve' })));
    expect(names(index.bySymbol('valve', 'root', 'x'))).toEqual(['d']);
    index.put(entryOf('d', viewOf({ symbol: 'tube' })));
    expect(index.bySymbol('valve', 'root', 'x')).toEqual([]);
    expect(index.remove('d')).toBe(true);
    expect(index.bySymbol('tube', 'root', 'x')).toEqual([]);
    expect(index.all).toHaveLength(3);
  });
});

import { describe, expect, it } from 'vitest';
import { designFiles } from '../../../core/files/designFiles';
import { arrayLine, holdsArray, symbolsOf } from '../../../extension/beside/generatedNames';
import { nodeSha256 } from '../../support/nodeSha256';
import { sampleResult } from '../../support/sampleResult';

const files = new Map(
  designFiles(
    sampleResult({ languages: ['c', 'c-source', 'rs'], symbol: 'belt', vectors: 16 }),
    nodeSha256,
  ).map(
    ({ path, bytes }) => [path.slice(path.lastIndexOf('/') + 1), new TextDecoder().decode(bytes)] as const,
  ),
);

describe('the line of the array', () => {
  it('is where the written C and Rust begin it, whatever the attributes', () => {
    for (const name of ['belt_taps.h', 'belt_taps.rs']) {
      const text = files.get(name)!;
      expect(holdsArray(`a/${name}`)).toBe(true);
      expect(text.split('\n')[arrayLine(text)!]).toMatch(/belt_taps\[.*= \{|^pub static TAPS: .*= \[/);
    }
    const attributes = { cBefore: '__attribute__((section(".fir")))', cAfter: 'PROGMEM', rust: '' };
    const other = designFiles(sampleResult({ attributes, symbol: 'belt' }), nodeSha256)
      .map(({ bytes }) => new TextDecoder().decode(bytes))
      .find((text) => text.includes('PROGMEM'))!;
    expect(other.split('\n')[arrayLine(other)!]).toContain('PROGMEM = {');
  });

  it('is none in files without one, with any line ends', () => {
    expect(arrayLine('/* belt_taps[r * BELT_LENGTH + k] = { */\r\nint x;\r\n')).toBeNull();
    expect(arrayLine('int x;\r\nstatic const int16_t belt_taps[4] = {\r\n')).toBe(1);
    expect(holdsArray('belt_vectors.h')).toBe(false);
  });
});

describe('the symbol of a word', () => {
  const of = (
    word: string,
    { before = '', text = '', language = 'c', known = ['belt', 'valve', 'belt_2'] } = {},
  ) => symbolsOf(word, before, known, () => text, language);

  it('is found in every name that the C files define', () => {
    const defined = [...files]
      .filter(([name]) => name.endsWith('.h') && name !== 'belt_filter.h')
      .flatMap(([, text]) => [
        ...[...text.matchAll(/^#define (BELT_\w+) +\S/gm)].map(([, name]) => name),
        ...[...text.matchAll(/^static const \w+ (\w+)\[/gm)].map(([, name]) => name),
      ]);
    expect(defined).toEqual(
      expect.arrayContaining(['belt_taps', 'belt_input', 'belt_expected', 'BELT_LENGTH']),
    );
    for (const name of defined) expect(of(name), name).toEqual(['belt']);
  });

  it('is not taken for another that starts the same, nor for any word', () => {
    expect(of('belt_2_taps')).toEqual(['belt_2']);
    expect(of('belt')).toEqual([]);
    expect(of('belt_tapsx')).toEqual([]);
    expect(of('BELT_SIZE')).toEqual([]);
    expect(of('TAPS', { text: 'belt_taps' })).toEqual([]);
  });

  it('is in Rust that of the module before the word, or those that the file names', () => {
    const rust = { language: 'rust' };
    expect(of('TAPS', { ...rust, before: '    let t = valve_taps::', text: 'mod belt_taps;' })).toEqual([
      'valve',
    ]);
    expect(of('TAPS', { ...rust, text: 'mod belt_taps;' })).toEqual(['belt']);
    expect(of('EXPECTED', { ...rust, text: 'use crate::belt_vectors::{INPUT, EXPECTED};' })).toEqual([
      'belt',
    ]);
    expect(of('belt_taps', rust)).toEqual(['belt']);
    expect(of('TAPS', { ...rust, text: 'static TAPS: [i16; 4]' })).toEqual([]);
    expect(of('TAPS', { ...rust, text: 'belt_taps.rs\npub static TAPS: [i16; 4]' })).toEqual(['belt']);
    expect(of('LENGTH', { ...rust, text: 'mod belt_taps;' })).toEqual([]);
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalJson, documentMeaning } from '../../../core/document/canonicalJson';
import { readDocument } from '../../../core/document/readDocument';
import { type Entry, minimal, readClean, take } from './documents';

describe('canonical JSON', () => {
  it('is as in the example of RFC 8785, 3.2.2 to 3.2.4 (from memory)', () => {
    const value = JSON.parse(
      '{"numbers": [333333333.33333329, 1E30, 4.50, 2e-3, 0.000000000000000000000000001],' +
        '"string": "\\u20ac$\\u000F\\u000aA\'\\u0042\\u0022\\u005c\\\\\\"\\/", "literals": [null, true, false]}',
    );
    expect(canonicalJson(value)).toBe(
      '{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],' +
        '"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}',
    );
  });

  it('sorts keys by UTF-16 units, as RFC 8785, 3.2.3 asks (from memory)', () => {
    const value = { '\u20ac': 1, '\r': 2, '\ufb33': 3, '1': 4, '\ud83d\ude00': 5, '\u0080': 6, '\u00f6': 7 };
    expect(Object.values(JSON.parse(canonicalJson(value)))).toHaveLength(7);
    expect(canonicalJson(value).match(/:\d/g)).toEqual([':2', ':4', ':6', ':7', ':1', ':5', ':3']);
  });

  it('writes -0 as 0 and leaves undefined out', () => {
    expect(canonicalJson({ b: -0, a: undefined, c: [-0] })).toBe('{"b":0,"c":[0]}');
  });

  it('throws for what is no JSON', () => {
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY, undefined, () => 1, 1n]) {
      expect(() => canonicalJson([value])).toThrow('when expected');
    }
  });

  it('reads back as the same value', () => {
    fc.assert(
      fc.property(fc.jsonValue({ noUnicodeString: false } as never), (value) => {
        expect(JSON.parse(canonicalJson(value))).toEqual(JSON.parse(JSON.stringify(value)));
      }),
      { numRuns: 500, seed: 1 },
    );
  });
});

describe('the meaning of a document', () => {
  const meaning = (document: Entry) => documentMeaning(readClean(document));

  /** The same keys in reverse order, at every level. */
  function reversed(value: unknown): unknown {
    if (Array.isArray(value)) return value.map(reversed);
    if (typeof value !== 'object' || value === null) return value;
    return Object.fromEntries(
      Object.entries(value)
        .reverse()
        .map(([key, item]) => [key, reversed(item)]),
    );
  }

  it('starts with the keys in order', () => {
    expect(meaning(minimal())).toMatch(/^\{"arithmetic":\{"accumulator":40,.*"pairing":1,.*"write":\{/);
  });

  it('is the same whatever the indentation, the order of keys and the line ends', () => {
    const full = minimal({
      title: 'Belt',
      filter: { length: 8, delay: 3 },
      takes: [take({ fit: { from: 0, to: 9 } })],
    });
    const texts = [
      JSON.stringify(full),
      JSON.stringify(full, null, 4),
      JSON.stringify(full, null, '\t').replaceAll('\n', '\r\n'),
      JSON.stringify(reversed(full), null, 2),
    ];
    expect(new Set(texts.map((text) => documentMeaning(readDocument(text).document!))).size).toBe(1);
  });

  it('is the same with defaults written out', () => {
    const bare = minimal({ title: 'Belt' });
    const found = readClean(bare);
    const { fit: _fit, heldOut: _heldOut, ...firstTake } = found.takes[0];
    expect(meaning({ pairing: 1, ...found } as Entry)).toBe(meaning(bare));
    expect(meaning({ pairing: 1, ...found, takes: [firstTake] } as Entry)).toBe(meaning(bare));
  });

  it('is the same where one value stands for a list of it', () => {
    const inputs = [{ file: 'a.wav' }, { file: 'b.wav', channel: 1 }];
    const short = { input: { fullScale: 2 }, output: { fullScale: 1 } };
    const long = { input: { fullScale: [2, 2.0] }, output: { fullScale: [1] } };
    expect(meaning(minimal({ takes: [take({ inputs, fit: { from: 0, to: 1 } })], arithmetic: short }))).toBe(
      meaning(
        minimal({ takes: [take({ inputs, fit: [{ from: -0, to: 1, samples: false }] })], arithmetic: long }),
      ),
    );
  });

  it('is the same with unknown keys, which are notes', () => {
    const { document } = readDocument(JSON.stringify(minimal({ comment: 'x', filter: { comment: 'y' } })));
    expect(documentMeaning(document!)).toBe(meaning(minimal()));
  });

  it('changes with every key that matters', () => {
    const changes: Entry[] = [
      { title: 'Other' },
      { job: 'predict' },
      { sampleRate: 8000 },
      { takes: [take({ name: 'other' })] },
      { takes: [take({ desired: { file: 'belt.csv', channel: 'frame' } })] },
      { takes: [take({ heldOut: { from: 0, to: 1 } })] },
      { takes: [take({ heldOut: { from: 0, to: 1, samples: true } })] },
      { takes: [take({ heldOut: [] })] },
      { takes: [take(), take()] },
      { prepare: { removeMean: false } },
      { prepare: { band: { from: 0, to: 1 } } },
      { filter: { length: 65 } },
      { filter: { delay: 1 } },
      { filter: { regularisation: 2e-6 } },
      { filter: { windowing: 'autocorrelation' } },
      { arithmetic: { word: 24 } },
      { arithmetic: { fractionBits: 3 } },
      { arithmetic: { input: { word: 12 } } },
      { arithmetic: { output: { fullScale: 3 } } },
      { write: { folder: 'other' } },
      { write: { symbol: 'other' } },
      { write: { languages: ['c', 'rs'] } },
      { write: { order: 'oldest-first' } },
      { write: { testVectors: 1 } },
      { limits: { heldOutNmse: -1 } },
      { limits: { quantisationLoss: 1 } },
    ];
    const all = [{}, ...changes].map((change) => meaning(minimal(change)));
    expect(new Set(all).size).toBe(all.length);
  });
});

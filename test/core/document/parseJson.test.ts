import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseJson } from '../../../core/document/parseJson';
import { readDocument } from '../../../core/document/readDocument';
import { say } from '../../../core/findings/say';
import { minimal } from './documents';

/** `line:column found | expected` of every broken place. */
function broken(text: string): string[] {
  const { document, findings } = readDocument(text);
  expect(document).toBe(null);
  return findings.map(({ code, values }) => {
    expect(code).toBe('broken-json');
    return `${values.line}:${values.column} ${values.found} | ${values.expected}`;
  });
}

describe('broken JSON is told with its place', () => {
  const number = 'a value, a comma or a bracket of JSON';
  it.each([
    ['nothing', '', ['1:1 the end of the file | a value']],
    ['blanks only', ' \n\n', ['3:1 the end of the file | a value']],
    ['an open brace', '{\n  "pairing": 1\n', ['3:1 the end of the file | a closing brace']],
    ['an open bracket', '[1', ['1:3 the end of the file | a closing bracket']],
    ['a comma before a closing brace', '{\n  "pairing": 1,\n}', ['3:1 } | a key in double quotes']],
    ['a comma before a closing bracket', '[1,\n]', ['2:1 ] | a value']],
    ['a missing comma', '{\n  "a": 1\n  "b": 2\n}', ['3:3 "b" | a comma']],
    ['a missing colon', '{ "a" 1 }', ['1:7 1 | a colon']],
    ['a missing value', '{ "a": }', ['1:8 } | a value']],
    ['a bare key', '{ a: 1 }', [`1:3 a | ${number}`]],
    ['single quotes', "{ 'a': 1 }", [`1:3 'a' | ${number}`]],
    ['NaN', '{ "regularisation": NaN }', [`1:21 NaN | ${number}`]],
    ['Infinity', '[Infinity]', [`1:2 Infinity | ${number}`]],
    ['a plus sign', '[+1]', [`1:2 +1 | ${number}`]],
    ['a leading nought', '[01]', ['1:3 1 | a comma']],
    ['a bare point', '[1.]', ['1:2 1. | a digit']],
    ['an unknown escape', '["\\q"]', ['1:2 "\\q" | one of " \\ / b f n r t u after a backslash']],
    ['a short escape', '["\\u12"]', ['1:2 "\\u12" | four hexadecimal digits after \\u']],
    ['an open text', '["a\n]', ['1:2 "a | a closing double quote on the same line']],
    ['a tab in a text', '["a\tb"]', ['1:2 "a\\u0009b" | text without control characters (a tab is \\t)']],
    ['a line comment', '// note\n{}', ['1:1 // note | no comment']],
    ['a block comment', '{\r\n/* note */\r\n}', ['2:1 /* note */ | no comment']],
    ['something after the end', '{}\nx', [`2:1 x | ${number}`]],
    [
      'marks of a merge',
      '{\n<<<<<<< ours\n"a": 1\n=======\n"a": 2\n>>>>>>> theirs\n}',
      [`2:1 <<<<<<< | ${number}`, `4:1 ======= | ${number}`, '5:1 "a" | a comma', `6:1 >>>>>>> | ${number}`],
    ],
  ])('%s', (_, text, expected) => {
    expect(broken(text)).toEqual(expected);
  });

  it('at five places at most', () => {
    expect(broken(`[\n${'NaN,\n'.repeat(50)}1]`)).toHaveLength(5);
  });

  it('in a sentence', () => {
    expect(say(readDocument('{\n  "pairing": 1,\n}').findings[0])).toBe(
      'line 3, column 1: got } when expected a key in double quotes. The document is strict JSON: no comments, no comma before a closing bracket.',
    );
  });
});

describe('strictness', () => {
  it('agrees with JSON.parse on mutilated documents', () => {
    const text = JSON.stringify(
      minimal({ title: 'a "b" \\ \u00e9', filter: { regularisation: 1.5e-7 } }),
      null,
      1,
    );
    const pieces = [
      '',
      ',',
      '"',
      '{',
      ']',
      '\\',
      '1',
      '.',
      '-',
      'e',
      ' ',
      '\n',
      '\t',
      'null',
      '\u00a0',
      '/',
      '\0',
    ];
    const cut = fc.tuple(fc.nat(text.length), fc.nat(3), fc.constantFrom(...pieces));
    fc.assert(
      fc.property(fc.array(cut, { maxLength: 3 }), (cuts) => {
        const given = cuts.reduce(
          (t, [at, length, put]) => t.slice(0, at) + put + t.slice(at + length),
          text,
        );
        const { value, findings } = parseJson(given);
        let expected: unknown;
        try {
          expected = JSON.parse(given);
        } catch {
          expect(findings.map(({ code }) => code)).toContain('broken-json');
          return;
        }
        if (findings.some(({ code }) => code === 'duplicate-key')) return;
        expect(findings).toEqual([]);
        expect(JSON.stringify(value)).toBe(JSON.stringify(expected));
      }),
      { numRuns: 2000, seed: 1 },
    );
  });

  it('passes over a byte order mark', () => {
    const { document, findings } = readDocument(`\ufeff${JSON.stringify(minimal())}`);
    expect(findings).toEqual([]);
    expect(document).not.toBe(null);
  });

  it('refuses repeated keys, with the place of the second', () => {
    const text =
      '{\n  "pairing": 1,\n  "job": "cancel",\n  "filter": { "length": 8, "delay": 0,\n    "length": 9 }\n}';
    const { document, findings } = readDocument(text);
    expect(document).toBe(null);
    expect(findings.map(({ path }) => path)).toEqual([['filter', 'length']]);
    expect(say(findings[0])).toBe(
      'line 5, column 5: got filter.length a second time when expected each key once. Take one of the two out.',
    );
  });
});

describe('size', () => {
  it('is 4 MiB at most, counted in bytes', () => {
    const fits = JSON.stringify(minimal({ comment: 'x'.repeat(4 * 1024 * 1024 - 200) }));
    expect(readDocument(fits).document).not.toBe(null);
    for (const comment of ['x'.repeat(4 * 1024 * 1024), '€'.repeat(1_400_000)]) {
      const { document, findings } = readDocument(JSON.stringify(minimal({ comment })));
      expect(document).toBe(null);
      expect(findings.map(({ code }) => code)).toEqual(['document-too-large']);
      expect(say(findings[0])).not.toContain('{');
    }
  });

  it('is 64 levels at most, whatever the brackets are', () => {
    const nested = (levels: number) => `${'['.repeat(levels)}${']'.repeat(levels)}`;
    expect(readDocument(`{"pairing":1,"x":${nested(63)}}`).findings.map(({ code }) => code)).not.toContain(
      'document-too-deep',
    );
    for (const text of [nested(65), '['.repeat(4_000_000), `/*"*/${'{"a":'.repeat(500_000)}`]) {
      expect(readDocument(text).findings.map(({ code }) => code)).toEqual(['document-too-deep']);
    }
  });
});

describe('any text', () => {
  it('never throws', () => {
    fc.assert(
      fc.property(
        fc.oneof(fc.string({ unit: 'binary', maxLength: 60 }), fc.json({ maxDepth: 4 })),
        (text) => {
          const { document, findings } = readDocument(text);
          expect(document === null).toBe(findings.some(({ severity }) => severity === 'blocker'));
          for (const found of findings) expect(say(found)).not.toBe('');
        },
      ),
      { numRuns: 2000, seed: 1 },
    );
  });

  it('never throws where the keys are right and the values are not', () => {
    const any = fc.oneof(
      fc.jsonValue({ maxDepth: 2 }),
      fc.constantFrom('float32', 'c', '', 'a/b', '..', 16, -1, 0, 1e308, true, [], {}),
    );
    const object = (...keys: string[]) =>
      fc.oneof(any, fc.record(Object.fromEntries(keys.map((key) => [key, any])), { requiredKeys: [] }));
    const track = object('file', 'channel');
    const interval = object('from', 'to', 'samples');
    const word = object('word', 'fullScale');
    const takeEntry = fc.record(
      {
        name: any,
        inputs: fc.oneof(any, fc.array(track, { maxLength: 3 })),
        desired: track,
        fit: fc.oneof(interval, fc.array(interval, { maxLength: 3 })),
        heldOut: interval,
        disturbanceOnly: interval,
      },
      { requiredKeys: [] },
    );
    const document = fc.record(
      {
        pairing: fc.constantFrom(1, 1, 1, 2),
        title: any,
        job: fc.constantFrom('cancel', 'identify', 'equalise', 'predict', 7),
        sampleRate: any,
        takes: fc.oneof(any, fc.array(takeEntry, { maxLength: 3 })),
        prepare: object('removeMean', 'band'),
        filter: object('length', 'delay', 'regularisation', 'windowing'),
        arithmetic: fc.record(
          { word: any, fractionBits: any, accumulator: any, input: word, output: word },
          { requiredKeys: [] },
        ),
        write: object('folder', 'symbol', 'languages', 'order', 'testVectors'),
        limits: object('heldOutNmse', 'quantisationLoss'),
      },
      { requiredKeys: [] },
    );
    fc.assert(
      fc.property(document, (value) => {
        const { document: found, findings } = readDocument(JSON.stringify(value));
        expect(found === null).toBe(findings.some(({ severity }) => severity === 'blocker'));
        for (const each of findings) {
          expect(each.path).toBeDefined();
          expect(say(each)).not.toMatch(/undefined|NaN|\[object/);
        }
      }),
      { numRuns: 2000, seed: 1 },
    );
  });
});

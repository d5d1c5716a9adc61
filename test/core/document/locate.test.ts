import { describe, expect, it } from 'vitest';
import { locate, locateFinding } from '../../../core/document/locate';
import { positionAt } from '../../../core/document/position';
import { readDocument } from '../../../core/document/readDocument';

const text = `{
  "pairing": 1,
  "takes": [
    { "name": "a", "inputs": [{ "file": "x" }, { "file": "y" }] },
    {
      "name": "b"
    }
  ], "filter": { "length": 0 }
}`;

describe('the place of a value', () => {
  it.each([
    [[], 1, 1],
    [['pairing'], 2, 14],
    [['takes'], 3, 12],
    [['takes', 0, 'name'], 4, 15],
    [['takes', 0, 'inputs', 1, 'file'], 4, 58],
    [['takes', 1], 5, 5],
    [['takes', 1, 'name'], 6, 15],
    [['filter', 'length'], 8, 28],
  ])('%j', (path, line, column) => {
    expect(locate(text, path)).toEqual({ line, column });
  });

  it.each([
    [['write', 'symbol'], 1, 1],
    [['takes', 1, 'inputs', 0, 'file'], 5, 5],
    [['takes', 7], 3, 12],
    [['takes', 'name'], 3, 12],
    [['pairing', 0], 2, 14],
    [['filter', 'delay'], 8, 16],
  ])('of what is not there is its deepest parent: %j', (path, line, column) => {
    expect(locate(text, path)).toEqual({ line, column });
  });

  it('counts all kinds of line ends', () => {
    expect(locate(text.replaceAll('\n', '\r\n'), ['takes', 1, 'name'])).toEqual({ line: 6, column: 15 });
    expect(locate(text.replaceAll('\n', '\r'), ['takes', 1, 'name'])).toEqual({ line: 6, column: 15 });
    expect(positionAt('a\r\n\nb', 3)).toEqual({ line: 2, column: 1 });
    expect(positionAt('', 0)).toEqual({ line: 1, column: 1 });
  });

  it('of broken JSON is its start or what was given', () => {
    expect(locate('{\n"a": }', ['a'])).toEqual({ line: 1, column: 1 });
    expect(locate('{\n"a": }', ['a'], 7)).toEqual({ line: 2, column: 6 });
  });
});

describe('the place of a finding', () => {
  const places = (given: string) => readDocument(given).findings.map((found) => locateFinding(given, found));

  it('is where the value is', () => {
    expect(places(text)).toContainEqual({ line: 8, column: 28 });
  });

  it('is where the JSON breaks', () => {
    expect(places('{\n  "a": 1,\n}')).toEqual([{ line: 3, column: 1 }]);
  });

  it('is where a key comes again', () => {
    expect(places('{ "a": 1,\n "a": 2 }')).toEqual([{ line: 2, column: 2 }]);
  });
});

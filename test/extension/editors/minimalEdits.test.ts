import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Change } from '../../../core/protocol/messages';
import { editedText, minimalEdits } from '../../../extension/editors/minimalEdits';

const text = `{
  "title": "Belt",
  "note": {"kept":   "as it is"},
  "takes": [
    {
      "name": "slow",
      "inputs": [
        { "file": "a.csv", "channel": "x" }
      ],
      "fit": { "from": 0, "to": 11 }
    }
  ],
  "filter": { "length": 64, "delay": 0 },
  "limits": {}
}
`;

const edited = (changes: Change[], before = text) => editedText(before, minimalEdits(before, changes));

/** Lines that are no longer there, and lines that came. */
function lineChanges(made: string, before = text): { gone: string[]; come: string[] } {
  const [old, now] = [before.split('\n'), made.split('\n')];
  return {
    gone: old.filter((line) => !now.includes(line)).map((line) => line.trim()),
    come: now.filter((line) => !old.includes(line)).map((line) => line.trim()),
  };
}

describe('edits of a document', () => {
  it('touch the characters that differ and no more', () => {
    expect(minimalEdits(text, [{ path: ['filter', 'length'], value: 48 }])).toEqual([
      { offset: text.indexOf('64'), length: 2, text: '48' },
    ]);
    expect(minimalEdits(text, [{ path: ['filter', 'delay'], value: 10 }])).toEqual([
      { offset: text.indexOf('0 }', text.indexOf('filter')), length: 0, text: '1' },
    ]);
  });

  it('are none where the text says so already, or has no such key', () => {
    expect(minimalEdits(text, [{ path: ['filter', 'length'], value: 64 }])).toEqual([]);
    expect(minimalEdits(text, [{ path: ['filter', 'windowing'] }])).toEqual([]);
    expect(minimalEdits(text, [{ path: ['prepare', 'band', 'from'] }])).toEqual([]);
  });

  it('put a key into an object on one line without laying it out again', () => {
    expect(lineChanges(edited([{ path: ['filter', 'windowing'], value: 'covariance' }]))).toEqual({
      gone: ['"filter": { "length": 64, "delay": 0 },'],
      come: ['"filter": { "length": 64, "delay": 0, "windowing": "covariance" },'],
    });
  });

  it('put a key on a line of its own where its neighbours have one', () => {
    expect(edited([{ path: ['sampleRate'], value: 800 }])).toBe(
      text.replace('"limits": {}\n', '"limits": {},\n  "sampleRate": 800\n'),
    );
  });

  it('make parents that are missing', () => {
    const made = edited([{ path: ['arithmetic', 'input', 'word'], value: 12 }]);
    expect(JSON.parse(made).arithmetic).toEqual({ input: { word: 12 } });
    expect(lineChanges(made).come).toEqual(['"limits": {},', '"arithmetic": { "input": { "word": 12 } }']);
    expect(JSON.parse(edited([{ path: ['limits', 'heldOutNmse'], value: -20 }])).limits).toEqual({
      heldOutNmse: -20,
    });
    expect(JSON.parse(edited([{ path: ['extra', 0, 'from'], value: 1 }])).extra).toEqual([{ from: 1 }]);
  });

  it('put an object where null stood', () => {
    const made = edited([{ path: ['band', 'from'], value: 5 }], '{\n  "band": null\n}\n');
    expect(made).toBe('{\n  "band": { "from": 5 }\n}\n');
  });

  it('set into lists and add to them', () => {
    const path = ['takes', 0, 'inputs'];
    expect(JSON.parse(edited([{ path: [...path, 0, 'channel'], value: 2 }])).takes[0].inputs[0].channel).toBe(
      2,
    );
    const made = edited([{ path: [...path, 1], value: { file: 'a.csv', channel: 'z' } }]);
    expect(lineChanges(made)).toEqual({
      gone: ['{ "file": "a.csv", "channel": "x" }'],
      come: ['{ "file": "a.csv", "channel": "x" },', '{ "file": "a.csv", "channel": "z" }'],
    });
    expect(made).toContain('\n        { "file": "a.csv", "channel": "z" }\n');
  });

  it('take keys out, first, last and only', () => {
    expect(edited([{ path: ['filter', 'length'] }])).toContain('"filter": { "delay": 0 }');
    expect(edited([{ path: ['filter', 'delay'] }])).toContain('"filter": { "length": 64 }');
    expect(edited([{ path: ['title'] }])).toBe(text.replace('  "title": "Belt",\n', ''));
    expect(edited([{ path: ['limits'] }])).toBe(text.replace(',\n  "limits": {}', ''));
    expect(edited([{ path: ['takes', 0, 'inputs', 0] }])).toContain('"inputs": []');
  });

  it('make several changes at once, later ones on what earlier ones left', () => {
    const changes: Change[] = [
      { path: ['takes', 0, 'heldOut', 'from'], value: 11 },
      { path: ['takes', 0, 'heldOut', 'to'], value: 24 },
      { path: ['filter', 'length'], value: 32 },
      { path: ['filter', 'delay'] },
    ];
    const edits = minimalEdits(text, changes);
    // The new length and the delay that goes stand side by side.
    expect(edits.length).toBe(2);
    const made = JSON.parse(editedText(text, edits));
    expect(made.takes[0].heldOut).toEqual({ from: 11, to: 24 });
    expect(made.filter).toEqual({ length: 32 });
  });

  it('keep line ends of two characters and an indent by tabs', () => {
    const windows = text.replaceAll('  ', '\t').replaceAll('\n', '\r\n');
    const made = edited(
      [
        { path: ['sampleRate'], value: 800 },
        { path: ['filter', 'delay'] },
        { path: ['takes', 0, 'inputs', 1], value: { file: 'b.csv', channel: 1 } },
      ],
      windows,
    );
    expect(made.replaceAll('\r\n', '')).not.toContain('\n');
    expect(made.replaceAll('\r\n', '')).not.toContain('\r');
    expect(made).toContain('\r\n\t"sampleRate": 800\r\n}');
    expect(made).toContain('\r\n\t\t\t\t{ "file": "b.csv", "channel": 1 }\r\n');
  });

  it('lay out a value that is too long for a line', () => {
    const value = Array.from({ length: 4 }, (_, i) => ({
      file: `a rather long name of a recording ${i}.csv`,
      channel: i,
    }));
    const made = edited([{ path: ['takes', 0, 'inputs'], value }]);
    expect(JSON.parse(made).takes[0].inputs).toEqual(value);
    expect(Math.max(...made.split('\n').map((line) => line.length))).toBeLessThan(110);
  });

  it('come out as the value that was asked for, whatever the document and its layout', () => {
    const key = fc.constantFrom('a', 'b', 'c', '__proto__x');
    const { tree } = fc.letrec<{ tree: unknown }>((tie) => ({
      tree: fc.oneof(
        { maxDepth: 3 },
        fc.integer(),
        fc.string(),
        fc.constant(null),
        fc.array(tie('tree'), { maxLength: 3 }),
        fc.dictionary(key, tie('tree'), { maxKeys: 3, noNullPrototype: true }),
      ),
    }));
    const change = fc.record({
      path: fc.array(key, { minLength: 1, maxLength: 3 }),
      value: fc.option(tree, { nil: undefined }),
    });
    const object = fc.dictionary(key, tree, { minKeys: 1, noNullPrototype: true });
    const layout = fc.constantFrom(undefined, 2, 4, '\t');
    fc.assert(
      fc.property(object, layout, fc.array(change, { maxLength: 3 }), (value, space, changes) => {
        const before = JSON.stringify(value, null, space);
        const expected = JSON.parse(before);
        for (const { path, value: wanted } of changes) setIn(expected, path, wanted);
        const edits = minimalEdits(before, changes);
        expect(JSON.parse(editedText(before, edits))).toEqual(expected);
        for (let i = 1; i < edits.length; i++) {
          expect(edits[i].offset).toBeGreaterThanOrEqual(edits[i - 1].offset + edits[i - 1].length);
        }
      }),
      { numRuns: 500 },
    );
  });
});

/** What a change means, on values. */
function setIn(root: Record<string, unknown>, path: readonly string[], value: unknown): void {
  const isObject = (x: unknown): x is Record<string, unknown> =>
    typeof x === 'object' && x !== null && !Array.isArray(x);
  let node = root;
  for (const key of path.slice(0, -1)) {
    if (!isObject(node[key])) {
      if (value === undefined) return;
      node[key] = {};
    }
    node = node[key] as Record<string, unknown>;
  }
  const last = path[path.length - 1];
  if (value === undefined) delete node[last];
  else node[last] = JSON.parse(JSON.stringify(value));
}

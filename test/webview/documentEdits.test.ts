import { describe, expect, it } from 'vitest';
import { readDocument } from '../../core/document/readDocument';
import type { ChoiceView, FileView, FormView } from '../../core/protocol/views';
import { documentView } from '../../extension/editors/documentView';
import { editedText, minimalEdits } from '../../extension/editors/minimalEdits';
import { pairedChange } from '../../webview/pairedValues';
import { missingKeys } from '../../webview/readable';
import { hear, newState } from '../../webview/state';
import { suggestionEdit } from '../../webview/suggestionEdit';
import {
  addInput,
  addTake,
  firstPair,
  removeInput,
  sameTrack,
  setTrack,
  trackChoices,
} from '../../webview/trackEdits';
import { wordEdit } from '../../webview/wordEdit';

const text = JSON.stringify({
  pairing: 1,
  job: 'cancel',
  takes: [
    {
      name: 'slow',
      inputs: [
        { file: 'a.csv', channel: 'x' },
        { file: 'a.csv', channel: 'z' },
      ],
      desired: { file: 'a.csv', channel: 'd' },
    },
    {
      name: 'fast',
      inputs: [
        { file: 'b.csv', channel: 'x' },
        { file: 'b.csv', channel: 'z' },
      ],
      desired: { file: 'b.csv', channel: 'd' },
    },
  ],
  arithmetic: { input: { word: 16, fullScale: [1, 2] } },
});
const formOf = (of: string): FormView => documentView(of).form!;

/** The document after the changes, by the editor's own edits; it has to be a valid one. */
function edited(of: string, changes: Parameters<typeof minimalEdits>[1]) {
  const read = readDocument(editedText(of, minimalEdits(of, changes)));
  expect(read.findings.filter(({ severity }) => severity === 'blocker')).toEqual([]);
  return read.document!;
}

describe('edits of takes', () => {
  it('points a signal elsewhere by what differs', () => {
    const before = { file: 'a.csv', channel: 'x' };
    expect(setTrack(['p'], before, { file: 'a.csv', channel: 2 })).toEqual([
      { path: ['p', 'channel'], value: 2 },
    ]);
    expect(setTrack(['p'], before, { file: 'c.csv', channel: 'x' })).toEqual([
      { path: ['p', 'file'], value: 'c.csv' },
    ]);
    expect(setTrack(['p'], before, before)).toEqual([]);
  });

  it('adds and removes inputs in every take, with their full scales', () => {
    const one = formOf(JSON.stringify({ ...JSON.parse(text), arithmetic: {} }));
    const grown = edited(
      JSON.stringify({ ...JSON.parse(text), arithmetic: {} }),
      addInput(one, 1, { file: 'c.csv', channel: 'y' }),
    );
    expect(grown.takes.map(({ inputs }) => inputs[2])).toEqual([
      { file: 'a.csv', channel: 'y' },
      { file: 'c.csv', channel: 'y' },
    ]);
    const less = edited(text, removeInput(formOf(text), 0));
    expect(less.takes.map(({ inputs }) => inputs)).toEqual([
      [{ file: 'a.csv', channel: 'z' }],
      [{ file: 'b.csv', channel: 'z' }],
    ]);
    expect(less.arithmetic.input.fullScale).toEqual([2]);
  });

  it('adds a take with as many inputs and a name of its own', () => {
    const more = edited(
      text,
      addTake(formOf(text), { file: 'c.csv', channel: 1 }, { file: 'c.csv', channel: 3 }),
    );
    expect(more.takes[2]).toMatchObject({
      name: 'take 3',
      inputs: [
        { file: 'c.csv', channel: 1 },
        { file: 'c.csv', channel: 'z' },
      ],
    });
  });

  it('makes a document of the first two recordings', () => {
    const empty = '{}';
    const document = hear(newState(), {
      type: 'document',
      generation: 1,
      answers: 0,
      ...documentView(empty),
    });
    const missing = missingKeys(document);
    expect(missing).toEqual(['pairing', 'job']);
    const made = edited(
      empty,
      firstPair({ file: 'a.wav', channel: 1 }, { file: 'a.wav', channel: 2 }, missing!),
    );
    expect(made.takes).toHaveLength(1);
  });

  it('offers every channel, and the present one where no file has it', () => {
    const level = { min: null, max: null, mean: null, rms: null, peakDb: null, rmsDb: null };
    const files: FileView[] = [
      {
        file: 'a.csv',
        format: '',
        pcm: false,
        samples: 1,
        sampleRate: null,
        channels: [
          { label: 'x', entry: 'x', ...level },
          { label: 'z', entry: 'z', ...level },
        ],
      },
    ];
    expect(trackChoices(files, { file: 'a.csv', channel: 2 })).toHaveLength(2);
    expect(sameTrack({ file: 'a.csv', channel: 2 }, { file: 'a.csv', channel: 'z' }, files)).toBe(true);
    expect(sameTrack({ file: 'a.csv', channel: 1 }, { file: 'a.csv', channel: 'z' }, files)).toBe(false);
    expect(trackChoices(files, { file: 'gone.csv', channel: 'x' })[0].label).toBe('gone.csv · x');
  });
});

describe('edits of the design', () => {
  const suggestion: NonNullable<ChoiceView['suggestion']> = {
    length: 32,
    delay: 0,
    regularisation: 1e-6,
    crossDb: -20,
    heldOutDb: null,
    macsPerSample: 32,
    reason: '',
  };

  it('takes a suggestion over by what differs', () => {
    const given = formOf(JSON.stringify({ ...JSON.parse(text), filter: { length: 64, delay: 0 } }));
    expect(suggestionEdit(given, suggestion)).toEqual([{ path: ['filter', 'length'], value: 32 }]);
    expect(suggestionEdit(given, { ...suggestion, length: 64 })).toEqual([]);
  });

  it('writes out a delay that would follow the length', () => {
    const loose = JSON.stringify({ ...JSON.parse(text), job: 'equalise', filter: { length: 64 } });
    const changes = suggestionEdit(formOf(loose), { ...suggestion, delay: 32 });
    expect(edited(loose, changes).filter).toMatchObject({ length: 32, delay: 32 });
  });

  it('waits for both ends of a band', () => {
    const path = ['prepare', 'band'];
    const first = pairedChange(path, null, {}, 'from', 10, ['from', 'to']);
    expect(first.changes).toEqual([]);
    const second = pairedChange(path, null, first.waiting, 'to', 90, ['from', 'to']);
    expect(second.changes).toEqual([{ path, value: { from: 10, to: 90 } }]);
    const present = { from: 10, to: 90 };
    expect(pairedChange(path, present, {}, 'to', 80, ['from', 'to']).changes).toEqual([
      { path: [...path, 'to'], value: 80 },
    ]);
    expect(pairedChange(path, present, {}, 'to', null, ['from', 'to']).changes).toEqual([{ path }]);
  });

  it('lets the signals follow the kind of the coefficients', () => {
    expect(wordEdit(formOf(text), '24')).toEqual([{ path: ['arithmetic', 'word'], value: 24 }]);
    const floats = edited(text, wordEdit(formOf(text), 'float32'));
    expect(floats.arithmetic).toMatchObject({
      word: 'float32',
      input: { word: 'float32' },
      output: { word: 'float32' },
    });
  });
});

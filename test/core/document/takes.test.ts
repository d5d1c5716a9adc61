import { describe, expect, it } from 'vitest';
import { say } from '../../../core/findings/say';
import { type Entry, minimal, problems, read, readClean, take } from './documents';

const withTake = (changes: Entry) => minimal({ takes: [take(changes)] });
const withTrack = (desired: unknown) => withTake({ desired });
const withFit = (fit: unknown) => withTake({ fit });

describe('the list of takes', () => {
  it('has one to a thousand', () => {
    expect(problems(minimal({ takes: [] }))).toEqual(['list-too-short at takes']);
    expect(problems(minimal({ takes: take() }))).toEqual(['not-a-list at takes']);
    expect(problems(minimal({ takes: [null] }))).toEqual(['not-an-object at takes.0']);
    expect(problems(minimal({ takes: Array.from({ length: 1001 }, () => take()) }))).toEqual([
      'list-too-long at takes',
    ]);
    expect(readClean(minimal({ takes: Array.from({ length: 1000 }, () => take()) })).takes).toHaveLength(
      1000,
    );
  });

  it('names takes by their number where they have no name', () => {
    const { takes } = readClean(minimal({ takes: [take(), take({ name: 'fast' }), take()] }));
    expect(takes.map(({ name }) => name)).toEqual(['take 1', 'fast', 'take 3']);
  });

  it('has different names', () => {
    const document = minimal({
      takes: [take({ name: 'fast' }), take({ name: 'slow' }), take({ name: 'fast' })],
    });
    expect(problems(document)).toEqual(['take-name-twice at takes.2.name']);
    expect(say(read(document).findings[0])).toBe(
      'takes 1 and 3 are both called "fast" when expected different names. Rename one.',
    );
    expect(problems(minimal({ takes: [take({ name: 'take 2' }), take()] }))).toEqual([
      'take-name-twice at takes.1.name',
    ]);
    expect(problems(withTake({ name: '' }))).toEqual(['empty-text at takes.0.name']);
    expect(problems(withTake({ name: 'a\nb' }))).toEqual(['control-character at takes.0.name']);
  });

  it('has as many inputs in each', () => {
    const inputs = [{ file: 'a.wav' }, { file: 'b.wav' }];
    const document = minimal({
      takes: [take({ inputs }), take({ inputs }), take({ inputs: inputs.slice(1) })],
    });
    expect(problems(document)).toEqual(['input-count-differs at takes.2.inputs']);
    expect(say(read(document).findings[0])).toContain('takes[2].inputs: got a list of 1 when expected 2');
  });

  it('has 1 to 64 inputs and a desired signal', () => {
    expect(problems(minimal({ takes: [{}] }))).toEqual([
      'missing-key at takes.0.inputs',
      'missing-key at takes.0.desired',
    ]);
    expect(problems(withTake({ inputs: [] }))).toEqual(['list-too-short at takes.0.inputs']);
    const inputs = Array.from({ length: 65 }, (_, k) => ({ file: 'a.wav', channel: k + 1 }));
    expect(problems(withTake({ inputs }))).toEqual(['list-too-long at takes.0.inputs']);
    expect(readClean(withTake({ inputs: inputs.slice(1) })).takes[0].inputs).toHaveLength(64);
  });
});

describe('a track', () => {
  it('is a channel by name or number, the first where none is given', () => {
    const channel = (given: Entry) =>
      readClean(withTrack({ file: 'a.wav', ...given })).takes[0].desired.channel;
    expect(channel({})).toBe(1);
    expect(channel({ channel: 3 })).toBe(3);
    expect(channel({ channel: '3' })).toBe('3');
    expect(channel({ channel: 'load\ncell' })).toBe('load\ncell');
    const bad = (given: unknown) => problems(withTrack({ file: 'a.wav', channel: given }));
    expect(bad('')).toEqual(['empty-text at takes.0.desired.channel']);
    expect(bad(0)).toEqual(['below-range at takes.0.desired.channel']);
    expect(bad(1.5)).toEqual(['not-whole at takes.0.desired.channel']);
    for (const given of [null, true, [1]])
      expect(bad(given)).toEqual(['not-a-channel at takes.0.desired.channel']);
  });

  it('has a file', () => {
    expect(problems(withTrack({}))).toEqual(['missing-key at takes.0.desired.file']);
    expect(problems(withTrack({ file: 7 }))).toEqual(['not-text at takes.0.desired.file']);
    expect(problems(withTrack({ file: '' }))).toEqual(['empty-text at takes.0.desired.file']);
    expect(problems(withTrack('a.wav'))).toEqual(['not-an-object at takes.0.desired']);
  });

  it.each([
    'a.wav',
    './a.wav',
    'b/c/a.wav',
    '../a.wav',
    'mit leer/ä.wav',
    '...',
    '.hidden',
    '12:30.wav',
    './x:y.wav',
  ])('takes the path %s', (file) => {
    expect(readClean(withTrack({ file })).takes[0].desired.file).toBe(file);
  });

  it.each([
    ['/etc/a.wav', 'path-absolute'],
    ['//host/a.wav', 'path-absolute'],
    ['\\\\host\\a.wav', 'path-absolute'],
    ['C:/a.wav', 'path-absolute'],
    ['c:a.wav', 'path-absolute'],
    ['http://host/a.wav', 'path-scheme'],
    ['file:a.wav', 'path-scheme'],
    ['vscode-remote:a', 'path-scheme'],
    ['b\\a.wav', 'path-backslash'],
    ['a\0.wav', 'control-character'],
    ['a\n.wav', 'control-character'],
    ['b/', 'path-names-folder'],
    ['.', 'path-names-folder'],
    ['b/..', 'path-names-folder'],
  ])('refuses the path %j', (file, code) => {
    expect(problems(withTrack({ file }))).toEqual([`${code} at takes.0.desired.file`]);
  });
});

describe('intervals', () => {
  it('are one or a list, in seconds or in samples', () => {
    const fitOf = (given: unknown) => readClean(withFit(given)).takes[0].fit;
    expect(fitOf({ from: 0.5, to: 2 })).toEqual([{ from: 0.5, to: 2, samples: false }]);
    expect(
      fitOf([
        { from: 3, to: 4 },
        { from: 0, to: 100, samples: true },
      ]),
    ).toEqual([
      { from: 3, to: 4, samples: false },
      { from: 0, to: 100, samples: true },
    ]);
    expect(fitOf(null)).toBe(null);
    expect(Object.is(fitOf({ from: -0, to: 1 })?.[0].from, 0)).toBe(true);
  });

  it('may be none, except for the fit', () => {
    expect(problems(withFit([]))).toEqual(['list-too-short at takes.0.fit']);
    const { takes } = readClean(withTake({ heldOut: [], disturbanceOnly: [] }));
    expect(takes[0]).toMatchObject({ fit: null, heldOut: [], disturbanceOnly: [] });
  });

  it('say how they are wrong', () => {
    expect(problems(withFit({ from: 4, to: 4 }))).toEqual(['range-empty at takes.0.fit']);
    expect(problems(withFit({ from: 4, to: 3 }))).toEqual(['range-reversed at takes.0.fit']);
    expect(
      problems(
        withFit([
          { from: 0, to: 1 },
          { from: 9, to: 3 },
        ]),
      ),
    ).toEqual(['range-reversed at takes.0.fit.1']);
    expect(problems(withFit({ from: -1, to: 3 }))).toEqual(['below-range at takes.0.fit.from']);
    expect(problems(withFit({ to: 3 }))).toEqual(['missing-key at takes.0.fit.from']);
    expect(problems(withFit({ from: '0', to: null }))).toEqual([
      'not-a-number at takes.0.fit.from',
      'not-a-number at takes.0.fit.to',
    ]);
    expect(problems(withFit({ from: 0.5, to: 3, samples: true }))).toEqual(['not-whole at takes.0.fit.from']);
    expect(problems(withFit({ from: 0, to: 3, samples: 1 }))).toEqual([
      'not-true-or-false at takes.0.fit.samples',
    ]);
    expect(problems(withFit(7))).toEqual(['not-an-object at takes.0.fit']);
    expect(problems(withTake({ disturbanceOnly: { from: 1, to: 1 } }))).toEqual([
      'range-empty at takes.0.disturbanceOnly',
    ]);
    expect(say(read(withFit({ from: 4, to: 3 })).findings[0])).toBe(
      'takes[0].fit: got 4 to 3 s, which runs backwards. Exchange the two.',
    );
  });

  it('are a thousand at most', () => {
    const many = Array.from({ length: 1001 }, (_, k) => ({ from: k, to: k + 1 }));
    expect(problems(withFit(many))).toEqual(['list-too-long at takes.0.fit']);
  });
});

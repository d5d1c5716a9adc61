import { describe, expect, it } from 'vitest';
import { finding } from '../../../core/findings/finding';
import { problemLine } from '../../../core/findings/problemLine';
import { findingView } from '../../../core/view/findingView';
import { fixesOf } from '../../../extension/beside/fixesOf';
import { problemsOf } from '../../../extension/beside/problemsOf';
import { problemText } from '../../../extension/beside/problemText';
import { relinkChanges } from '../../../extension/beside/relinkChanges';
import { type Entry, type Standing, standingInWords, standingOf } from '../../../extension/beside/standing';
import { english } from '../../../extension/beside/words';
import { editedText, minimalEdits } from '../../../extension/editors/minimalEdits';
import { entryOf, findingOf, viewOf } from './entries';

const header = 'fir/generated/belt_taps.h';
const of = (entry: Entry) =>
  problemsOf(entry, english).map(({ path, at, severity, code, text }) => ({
    path,
    at,
    severity,
    code,
    text,
  }));
const withFindings = (...findings: ReturnType<typeof findingOf>[]) =>
  entryOf('belt.pairing.json', viewOf({ findings }));

describe('problems of a pairing', () => {
  it('are none where it is current, never written or not looked at', () => {
    expect(of(entryOf('a'))).toEqual([]);
    expect(of(entryOf('a', viewOf({})))).toEqual([]);
    const never = findingOf({ code: 'not-written', position: { line: 1, column: 1 } });
    expect(of(entryOf('a', viewOf({ state: 'not-written', findings: [never], others: [] })))).toEqual([]);
  });

  it('stand at the array for what is stale, and name the cause', () => {
    const stale = withFindings(
      findingOf({ code: 'stale-recording', file: 'slow.csv' }),
      findingOf({ code: 'stale-document', file: 'generated/belt.taps.json' }),
    );
    expect(of(stale)).toEqual([
      {
        path: header,
        at: 'array',
        severity: 'warning',
        code: 'stale-recording',
        text: 'The recording slow.csv is not the one that the taps were made from.',
      },
      {
        path: header,
        at: 'array',
        severity: 'warning',
        code: 'stale-document',
        text: 'belt.pairing.json has changed since the taps were made.',
      },
    ]);
  });

  it('stand in the taps file where no file holds an array', () => {
    const view = viewOf({ others: [], findings: [findingOf({ code: 'stale-document' })] });
    expect(of(entryOf('a', view))[0].path).toBe('fir/generated/belt.taps.json');
  });

  it('stand in the file that was edited', () => {
    const edited = findingOf({ code: 'edited', file: 'generated/belt_vectors.h' });
    expect(of(withFindings(edited))[0].path).toBe('fir/generated/belt_vectors.h');
    // Outside the root nothing is shown.
    expect(of(withFindings({ ...edited, file: '../../x.h' }))).toEqual([]);
  });

  it('are errors for a limit exceeded, told by the taps file or by a check, once', () => {
    const over = entryOf('a', viewOf({ state: 'over-limit', overLimit: ['too much'] }));
    expect(of(over)).toEqual([
      { path: header, at: 'array', severity: 'error', code: 'over-limit', text: 'too much' },
    ]);
    const checked = [findingOf({ code: 'over-limit', severity: 'caution', text: 'found again' })];
    expect(of({ ...over, checked }).map(({ text }) => text)).toEqual(['found again']);
  });

  it('stand in the document for blockers, once each, and cautions are none', () => {
    const position = { line: 3, column: 9 };
    const missing = findingOf({ code: 'missing-file', file: 'slow.csv', text: 'it is gone', position });
    const entry = {
      ...withFindings(missing, findingOf({ code: 'clipped', severity: 'caution', position })),
      checked: [missing, findingOf({ code: 'trivial', text: 'copies', position })],
    };
    expect(of(entry)).toEqual([
      {
        path: 'fir/belt.pairing.json',
        at: position,
        severity: 'error',
        code: 'missing-file',
        text: 'slow.csv: it is gone',
      },
      { path: 'fir/belt.pairing.json', at: position, severity: 'error', code: 'trivial', text: 'copies' },
    ]);
    expect(problemsOf(entry, english).map(({ missing }) => missing)).toEqual(['slow.csv', null]);
  });

  it('are mended by what suits them', () => {
    const at = { line: 1, column: 1 };
    expect(fixesOf({ code: 'stale-recording', at: 'array', missing: null })).toEqual(['write', 'open']);
    expect(fixesOf({ code: 'over-limit', at: 'array', missing: null })).toEqual(['open']);
    expect(fixesOf({ code: 'missing-file', at, missing: 'slow.csv' })).toEqual(['relink', 'show', 'open']);
    expect(fixesOf({ code: 'trivial', at, missing: null })).toEqual(['show', 'open']);
  });
});

describe('the standing of a pairing', () => {
  it('is that of its digests, and of a check where those are current', () => {
    expect(standingOf(entryOf('a'))).toBe('unknown');
    expect(standingOf(entryOf('a', viewOf({ state: 'edited' })))).toBe('edited');
    const current = entryOf('a', viewOf({}));
    const checked = (...codes: string[]) => ({
      ...current,
      checked: codes.map((code) => findingOf({ code })),
    });
    expect(standingOf(current)).toBe('current');
    expect(standingOf(checked('clipped'))).toBe('current');
    expect(standingOf(checked('over-limit', 'different'))).toBe('different');
    expect(standingOf(checked('over-limit'))).toBe('over-limit');
    expect(standingOf({ ...checked('different'), view: viewOf({ state: 'recording-changed' }) })).toBe(
      'recording-changed',
    );
  });

  it('has words of its own for each', () => {
    const all: Standing[] = [
      'unknown',
      'current',
      'recording-changed',
      'document-changed',
      'edited',
      'over-limit',
      'not-written',
      'different',
      'bad-input',
    ];
    expect(new Set(all.map((one) => standingInWords(one, english))).size).toBe(all.length);
  });
});

describe('a moved recording', () => {
  const text = `{
  "pairing": 1, "job": "cancel", "mine": [1,2],
  "takes": [ { "inputs": [ { "file": "slow.csv", "channel": "x" }, { "file": "other.csv", "channel": "x" } ],
               "desired": { "file": "slow.csv", "channel": "d" }, "fit": { "from": 0, "to": 1 } } ]
}`;

  it('is named anew wherever the document names it, and nothing else changes', () => {
    const changes = relinkChanges(text, 'slow.csv', 'old/slow.csv');
    expect(changes.map(({ path }) => path.join('/'))).toEqual([
      'takes/0/inputs/0/file',
      'takes/0/desired/file',
    ]);
    expect(editedText(text, minimalEdits(text, changes))).toBe(
      text.replaceAll('"slow.csv"', '"old/slow.csv"'),
    );
  });

  it('is nothing in a text that cannot be read, or that does not name it', () => {
    expect(relinkChanges('{', 'slow.csv', 'x.csv')).toEqual([]);
    expect(relinkChanges(text, 'fast.csv', 'x.csv')).toEqual([]);
  });
});

describe('a finding as a line', () => {
  it('stands at the document or at the file beside it, on one line', () => {
    const position = { line: 3, column: 9 };
    const at = (change: Parameters<typeof findingOf>[0]) =>
      problemText(findingOf(change), 'fir/belt.pairing.json');
    expect(at({ code: 'trivial', text: 'copies', position })).toBe(
      'fir/belt.pairing.json:3:9: error: copies [trivial]',
    );
    expect(
      at({ severity: 'caution', code: 'clipped', file: 'slow.csv', place: 'slow.csv', text: 'flat' }),
    ).toBe('fir/slow.csv:1:1: warning: flat [clipped]');
    expect(at({ severity: 'note', file: 'a\nb.csv' })).toMatch(/^fir\/a\\u000ab\.csv:1:1: note: /);
  });

  it('is the line that the command line prints', () => {
    const text = '{\n  "job": "cancel"\n}';
    const places = [
      {},
      { path: ['job'] },
      { path: ['job'], file: 'slow.csv', channel: 'cell' },
      { file: 'slow.csv' },
      { file: 'slow.csv', line: 7 },
      { file: 'slow, 1\n.csv', channel: 'cell', from: 100, to: 140 },
      { file: 'slow.csv', line: 7, take: 'fast', channel: 'line 3', from: 1 },
    ];
    for (const place of places) {
      const found = finding('missing-file', {}, place);
      expect(problemText(findingView(found, text), 'belt.pairing.json')).toBe(
        problemLine(found, 'belt.pairing.json', text),
      );
    }
  });
});

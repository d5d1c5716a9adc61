import { mkdirSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeEach, describe, expect, it } from 'vitest';
import { emptyFolder, snapshot, tapwright } from '../support/cli';
import { normals } from '../support/random';

// Bad input on the command line: exit 2, lines that say file, what was found and what was expected, nothing written,
// no stack trace.

/** A two-channel text recording of noise and what a short path makes of it. */
function csv(samples = 400, change: (row: string[], n: number) => void = () => {}): string {
  const x = normals(1, samples);
  const rows = Array.from(x, (value, n) => {
    const row = [value.toFixed(5), (0.5 * value + 0.25 * (x[n - 1] ?? 0)).toFixed(5)];
    change(row, n);
    return row.join(',');
  });
  return `x,d\n${rows.join('\n')}\n`;
}

type Document = Record<string, unknown>;

const good: Document = {
  pairing: 1,
  title: 'Case',
  job: 'identify',
  sampleRate: 1000,
  takes: [
    {
      inputs: [{ file: 'a.csv', channel: 'x' }],
      desired: { file: 'a.csv', channel: 'd' },
      fit: { from: 0, to: 0.25 },
      heldOut: { from: 0.25, to: 0.4 },
    },
  ],
  filter: { length: 8 },
  write: { symbol: 'case_one' },
};

const take = (change: object): Document => ({
  ...good,
  takes: [{ ...(good.takes as object[])[0], ...change }],
});
const filter = (change: object): Document => ({ ...good, filter: { length: 8, ...change } });

let folder: string;
beforeEach(() => {
  folder = emptyFolder();
  writeFileSync(join(folder, 'a.csv'), csv());
});

function designs(document: Document | string) {
  writeFileSync(
    join(folder, 'case.pairing.json'),
    typeof document === 'string' ? document : JSON.stringify(document, null, 2),
  );
  return tapwright(folder, 'design', 'case.pairing.json');
}

/** Runs the design and expects it to be refused. */
function expectRefused(document: Document | string, code: string, ...words: (string | RegExp)[]) {
  writeFileSync(
    join(folder, 'case.pairing.json'),
    typeof document === 'string' ? document : JSON.stringify(document, null, 2),
  );
  const before = snapshot(folder);
  const { status, out, err } = tapwright(folder, 'design', 'case.pairing.json');
  expect(err).toMatch(new RegExp(`^[^\\n]+:\\d+:\\d+: error: .*\\[${code}\\]$`, 'm'));
  for (const word of words) expect(err).toMatch(word);
  expect(err).not.toMatch(/\n\s+at /);
  expect(out).toBe('');
  expect(status).toBe(2);
  expect(snapshot(folder)).toEqual(before);
}

describe('tapwright design', () => {
  it('designs the good case, so that what follows is refused for its own fault', () => {
    const { status, err } = designs(good);
    expect(err.replace(/^.*: note: .*\n/gm, '')).toBe('');
    expect(status).toBe(0);
  });

  it.each<[string, Document | string, string, (string | RegExp)[]]>([
    ['broken JSON', '{ "pairing": 1,\n  "job": identify }', 'broken-json', [/case\.pairing\.json:2:10/]],
    ['wrong version', { ...good, pairing: 2 }, 'version-unknown', ['2']],
    ['missing file', take({ desired: { file: 'b.csv', channel: 'd' } }), 'missing-file', ['b.csv']],
    [
      'file outside the folder',
      take({ desired: { file: '../b.csv', channel: 'd' } }),
      'outside-root',
      [/\.\.\/b\.csv/],
    ],
    ['absolute path', take({ desired: { file: '/etc/hostname', channel: 1 } }), 'path-absolute', []],
    [
      'channel name that is not there',
      take({ desired: { file: 'a.csv', channel: 'q' } }),
      'channel-missing',
      ['"q"', 'x, d'],
    ],
    [
      'channel number that is not there',
      take({ desired: { file: 'a.csv', channel: 3 } }),
      'channel-missing',
      ['"3"'],
    ],
    ['empty interval', take({ fit: { from: 0.1, to: 0.1 } }), 'range-empty', []],
    ['interval shorter than a sample', take({ fit: { from: 0.1, to: 0.1004 } }), 'interval-empty', []],
    ['reversed interval', take({ fit: { from: 0.2, to: 0.1 } }), 'range-reversed', []],
    ['overlapping intervals', take({ heldOut: { from: 0.2, to: 0.4 } }), 'interval-overlap', ['200 to 250']],
    [
      'interval past the end',
      take({ heldOut: { from: 0.25, to: 0.5 } }),
      'interval-past-end',
      ['500', '400'],
    ],
    ['length 0', filter({ length: 0 }), 'out-of-range', ['length']],
    ['length 2.5', filter({ length: 2.5 }), 'not-whole', ['length']],
    ['length longer than the data', filter({ length: 300 }), 'too-few-samples', ['300']],
    ['negative regularisation', filter({ regularisation: -1 }), 'out-of-range', ['regularisation']],
    [
      'regularisation that is NaN',
      JSON.stringify(filter({})).replace('"length":8', '"length":8,"regularisation":NaN'),
      'broken-json',
      [],
    ],
    ['regularisation as text', filter({ regularisation: 'NaN' }), 'not-a-number', ['regularisation']],
    ['delay beyond the recording', filter({ delay: 5000 }), 'too-few-samples', []],
    ['symbol that is no C identifier', { ...good, write: { symbol: '2nd filter' } }, 'symbol-form', []],
    ['symbol that is a keyword', { ...good, write: { symbol: 'while' } }, 'symbol-keyword', []],
    [
      'output folder outside',
      { ...good, write: { symbol: 'a', folder: '../out' } },
      'outside-root',
      [/\.\.\/out/],
    ],
    ['desired signal that is the input', take({ desired: { file: 'a.csv', channel: 'x' } }), 'trivial', []],
    ['no sample rate', { ...good, sampleRate: null }, 'rate-missing', ['sampleRate']],
    ['unknown job', { ...good, job: 'denoise' }, 'not-one-of', ['denoise', 'cancel']],
  ])('refuses %s', (_, document, code, words) => {
    expectRefused(document, code, ...words);
  });

  it.each<[string, () => string | Buffer, string]>([
    ['a text that is not numbers', () => 'x,d\n1,2\n3,four\n', 'not-a-number-cell'],
    ['ragged rows', () => csv(400, (row, n) => n === 57 && row.push('9')), 'ragged-row'],
    [
      'a sample that is NaN',
      () => csv(400, (row, n) => n === 57 && row.splice(1, 1, 'nan')),
      'not-finite-used',
    ],
    ['a silent input', () => csv(400, (row) => row.splice(0, 1, '0')), 'silent'],
    ['a silent desired signal', () => csv(400, (row) => row.splice(1, 1, '3')), 'silent'],
    ['an empty file', () => '', 'empty-file'],
    ['a WAV header and nothing more', () => Buffer.from('RIFF\x24\0\0\0WAVE', 'latin1'), 'unreadable-header'],
  ])('refuses %s', (_, bytes, code) => {
    writeFileSync(join(folder, 'a.csv'), bytes());
    expectRefused(good, code);
  });

  it('refuses a link that leads out of the folder', () => {
    const other = emptyFolder();
    writeFileSync(join(other, 'secret.csv'), csv());
    symlinkSync(join(other, 'secret.csv'), join(folder, 'link.csv'));
    expectRefused(take({ desired: { file: 'link.csv', channel: 'd' } }), 'outside-root');
  });

  it('refuses a folder in place of a recording', () => {
    mkdirSync(join(folder, 'b.csv'));
    expectRefused(take({ desired: { file: 'b.csv', channel: 'd' } }), 'not-a-file');
  });

  it('refuses to overwrite a file that it did not write', () => {
    mkdirSync(join(folder, 'generated'));
    writeFileSync(join(folder, 'generated', 'case_one_taps.h'), '/* mine */\n');
    expectRefused(good, 'foreign-file', 'case_one_taps.h');
  });

  it('names the smallest regularisation where the system cannot be solved', () => {
    const sine = Array.from(
      { length: 400 },
      (_, n) => `${Math.sin(n).toFixed(12)},${Math.cos(n).toFixed(12)}`,
    );
    writeFileSync(join(folder, 'a.csv'), `x,d\n${sine.join('\n')}\n`);
    expectRefused(
      filter({ length: 16, regularisation: 0 }),
      'unsolvable',
      /smallest regularisation that can be solved is \d/,
    );
    const smallest = /can be solved is ([\d.e-]+)/.exec(
      designs(filter({ length: 16, regularisation: 0 })).err,
    )?.[1];
    expect(designs(filter({ length: 16, regularisation: Number(smallest) })).status).toBe(0);
  });
});

describe('a name of the document', () => {
  it.each([
    ['\u202eca\nse.pairing.json', 'control-character'],
    ['ca\\se.pairing.json', 'path-backslash'],
  ])('that written files cannot have is refused before anything is written: %j', (name, code) => {
    writeFileSync(join(folder, name), JSON.stringify(good));
    const before = snapshot(folder);
    for (const command of ['design', 'check']) {
      const { status, out, err } = tapwright(folder, command, name);
      expect(out + err).toMatch(
        new RegExp(`^[^\\n]+: error: NAME\\.pairing\\.json: got .*\\[${code}\\]$`, 'm'),
      );
      expect([status, snapshot(folder)]).toEqual([2, before]);
    }
  });

  it.each(['c:ase.pairing.json', '#$(cäse) 1.pairing.json'])('that is only unusual is taken: %j', (name) => {
    writeFileSync(join(folder, name), JSON.stringify(good));
    expect(tapwright(folder, 'design', name).status).toBe(0);
    expect(tapwright(folder, 'check', name)).toMatchObject({ status: 0, err: '' });
  });
});

describe('the other commands', () => {
  it.each([
    [['inspect', 'nothing.wav'], 'missing-file'],
    [['inspect', 'nothing.pairing.json'], 'missing-document'],
    [['check', 'nothing.pairing.json'], 'missing-document'],
    [['check', 'noise.wav'], 'not-a-document'],
    [['pair', 'nothing.wav', 'a.csv', '--rate', '1000'], 'missing-file'],
    [['pair', 'a.csv', '--desired', 'q'], 'channel-missing'],
    [['pair', '/etc/hostname', 'a.csv'], 'outside-root'],
    [['apply', 'nothing.taps.json', 'a.csv', '-o', 'o.wav'], 'missing-file'],
    [['apply', 'a.csv', 'a.csv', '-o', 'o.wav'], 'not-taps'],
  ])('%j: exit 2', (args, code) => {
    writeFileSync(join(folder, 'noise.wav'), Buffer.from('RIFF\0\0\0\0WAVE', 'latin1'));
    const before = snapshot(folder);
    const { status, out, err } = tapwright(folder, ...args);
    expect(out + err).toMatch(new RegExp(`^[^\\n]+:\\d+:\\d+: error: .*\\[${code}\\]$`, 'm'));
    expect(err).not.toMatch(/\n\s+at /);
    expect(status).toBe(2);
    expect(snapshot(folder)).toEqual(before);
  });

  it.each([
    [[], /tapwright design/],
    [['desing', 'a'], /expected one of pair, inspect, choose, design, check, apply/],
    [['design'], /expected DOC/],
    [['design', 'a.pairing.json', '--fast'], /--fast/],
    [['apply', 'a', 'b'], /-o/],
    [['pair', 'a.csv', '-o', 'a.json'], /\.pairing\.json/],
    [['pair', 'a.csv', '--job', 'x'], /cancel, identify/],
    [['pair', 'a.csv', '--rate', 'fast'], /--rate/],
  ])('wrong use %j: exit 2 and a way on', (args, expected) => {
    const { status, out, err } = tapwright(folder, ...args);
    expect(out + err).toMatch(expected);
    expect(err).not.toMatch(/\n\s+at /);
    expect(status).toBe(2);
  });
});

import {
  existsSync,
  lstatSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { beforeEach, describe, expect, it } from 'vitest';
import { markLine } from '../../../core/files/generatedMark';
import { writeFiles } from '../../../extension/node/writeFiles';
import { emptyFolder, snapshot, tapwright } from '../../support/cli';
import { normals } from '../../support/random';

// Links of the local disk, both ways: nothing outside the root is read or written.

let root: string;
let other: string;

const csv = (() => {
  const x = normals(1, 400);
  const rows = Array.from(
    x,
    (value, n) => `${value.toFixed(5)},${(0.5 * value + (x[n - 1] ?? 0)).toFixed(5)}`,
  );
  return `x,d\n${rows.join('\n')}\n`;
})();

function writeDocument(path: string, file: string, folder = 'generated'): void {
  const document = {
    pairing: 1,
    title: 'Case',
    job: 'identify',
    sampleRate: 1000,
    takes: [
      {
        inputs: [{ file, channel: 'x' }],
        desired: { file, channel: 'd' },
        fit: { from: 0, to: 0.25 },
        heldOut: { from: 0.25, to: 0.4 },
      },
    ],
    filter: { length: 4 },
    write: { symbol: 'case_one', folder },
  };
  writeFileSync(path, JSON.stringify(document));
}

beforeEach(() => {
  const place = emptyFolder();
  root = join(place, 'workspace');
  other = join(place, 'other');
  for (const folder of [root, other]) mkdirSync(folder);
  for (const folder of [root, other]) writeFileSync(join(folder, 'a.csv'), csv);
  writeDocument(join(root, 'case.pairing.json'), 'a.csv');
});

const designs = (document = 'case.pairing.json') => tapwright(root, 'design', document, '--root', '.');

function expectRefused(run: { status: number | null; err: string }, code = 'outside-root'): void {
  expect(run.err).toContain(`[${code}]`);
  expect(run.err).not.toMatch(/\n\s+at /);
  expect(run.status).toBe(2);
  expect(Object.keys(snapshot(other))).toEqual(['a.csv']);
  expect(readFileSync(join(other, 'a.csv'), 'utf8')).toBe(csv);
}

describe('writing', () => {
  it('does not follow a link in place of the folder', () => {
    symlinkSync(other, join(root, 'generated'));
    expectRefused(designs());
  });

  it('does not follow a link on the way to the folder', () => {
    symlinkSync(other, join(root, 'up'));
    writeDocument(join(root, 'case.pairing.json'), 'a.csv', 'up/generated');
    expectRefused(designs());
  });

  it('does not follow a link in place of a file', () => {
    mkdirSync(join(root, 'generated'));
    symlinkSync(join(other, 'a.csv'), join(root, 'generated', 'case_one_taps.h'));
    expectRefused(designs());
    expect(readdirSync(join(root, 'generated'))).toEqual(['case_one_taps.h']);
  });

  it('makes nothing where links lead to what is not there', () => {
    symlinkSync(join(other, 'none'), join(root, 'generated'));
    expect(designs().status).toBe(2);
    expect(existsSync(join(other, 'none'))).toBe(false);
  });

  it('puts its file in the place of a link that leads nowhere, not where the link leads', () => {
    mkdirSync(join(root, 'generated'));
    symlinkSync(join(other, 'none.h'), join(root, 'generated', 'case_one_taps.h'));
    designs();
    expect(existsSync(join(other, 'none.h'))).toBe(false);
  });

  it.each(['../../other/a.csv', '../a.csv', '../../other/none'])(
    'does not follow a link to %s that lies where a file is written first',
    async (target) => {
      mkdirSync(join(root, 'generated'));
      const path = 'generated/case_one_taps.h';
      // The names of the next files of this process.
      for (let n = 1; n <= 40; n++) symlinkSync(target, join(root, `${path}.${process.pid}.${n}.tmp`));
      const mark = markLine({ document: 'case.pairing.json', digest: 'a'.repeat(64) }, 'c');
      const { findings } = await writeFiles(root, root, [{ path, bytes: new TextEncoder().encode(mark) }]);
      expect([findings, readFileSync(join(root, path), 'utf8')]).toEqual([[], mark]);
      expect(lstatSync(join(root, path)).isFile()).toBe(true);
      expect(readFileSync(join(root, 'a.csv'), 'utf8')).toBe(csv);
      expect(Object.keys(snapshot(other))).toEqual(['a.csv']);
      expect(readFileSync(join(other, 'a.csv'), 'utf8')).toBe(csv);
    },
  );

  it('follows a link that stays inside', () => {
    mkdirSync(join(root, 'firmware'));
    symlinkSync('firmware', join(root, 'generated'));
    expect(designs().status).toBe(0);
    expect(existsSync(join(root, 'firmware', 'case_one_taps.h'))).toBe(true);
  });
});

describe('reading', () => {
  it('does not follow a link to a folder', () => {
    symlinkSync(other, join(root, 'takes'));
    writeDocument(join(root, 'case.pairing.json'), 'takes/a.csv');
    expectRefused(designs());
  });

  it('does not open a document over a link', () => {
    writeDocument(join(other, 'case.pairing.json'), 'a.csv');
    symlinkSync(join(other, 'case.pairing.json'), join(root, 'linked.pairing.json'));
    const { status, err } = designs('linked.pairing.json');
    expect(err).toContain('[outside-root]');
    expect(status).toBe(2);
  });

  it('follows a link that stays inside', () => {
    symlinkSync('a.csv', join(root, 'b.csv'));
    writeDocument(join(root, 'case.pairing.json'), 'b.csv');
    expect(designs().status).toBe(0);
  });

  it('ends where links lead to each other', () => {
    symlinkSync('two.csv', join(root, 'one.csv'));
    symlinkSync('one.csv', join(root, 'two.csv'));
    writeDocument(join(root, 'case.pairing.json'), 'one.csv');
    const { status, err } = designs();
    expect(err).toMatch(/\[(unreadable-file|missing-file|outside-root)\]/);
    expect(status).toBe(2);
  });

  it.each([
    ['C:/a.csv', 'path-absolute'],
    ['c:a.csv', 'path-absolute'],
    ['\\\\server\\share\\a.csv', 'path-absolute'],
    ['file:///etc/hostname', 'path-scheme'],
    ['vscode-remote://host/a.csv', 'path-scheme'],
    ['..\\other\\a.csv', 'path-backslash'],
    ['x/../../other/a.csv', 'outside-root'],
    ['%2e%2e/other/a.csv', 'missing-file'],
    ['A.CSV', 'missing-file'],
    ['~/a.csv', 'missing-file'],
    ['a.csv/', 'path-names-folder'],
  ])('refuses %s', (file, code) => {
    writeDocument(join(root, 'case.pairing.json'), file);
    expectRefused(designs(), code);
  });
});

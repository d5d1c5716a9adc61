import { spawnSync } from 'node:child_process';
import { chmodSync, chownSync, copyFileSync, mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import { emptyFolder, project, snapshot, tapwright } from '../../support/cli';
import { leftovers, patience, small, smallDocument, smallPairing } from './smallPairing';

// Disks that take nothing more, and folders that may not be written: the real ones of Linux.

const isRoot = process.getuid?.() === 0;
const cli = join(project, 'dist', 'cli.js');

/** A problem line with the code, exit 2 and no stack trace. */
function expectNotWritable(
  { status, out, err }: { status: number | null; out: string; err: string },
  why: RegExp,
): void {
  expect(err).toMatch(/^[^\n]+:\d+:\d+: error: .*\[not-writable\]$/m);
  expect(err).toMatch(why);
  expect(err + out).not.toMatch(/\n\s+at /);
  expect(status).toBe(2);
}

describe.skipIf(process.platform !== 'linux')('a full disk', { timeout: patience }, () => {
  const mounted: string[] = [];
  afterEach(() => {
    for (const place of mounted.splice(0)) spawnSync('umount', [place]);
  });

  /** Moves a pairing to a disk of so many KiB; null where nothing may be mounted. */
  function onSmallDisk(kibibytes: number): string | null {
    const place = emptyFolder();
    const options = ['-t', 'tmpfs', '-o', `size=${kibibytes}k`, 'tmpfs', place];
    if (spawnSync('mount', options).status !== 0) return null;
    mounted.push(place);
    const from = smallPairing();
    for (const name of readdirSync(from)) copyFileSync(join(from, name), join(place, name));
    return place;
  }

  it.skipIf(!isRoot)('says so, keeps every old file and needs only space to go on', (context) => {
    const folder = onSmallDisk(512);
    if (folder === null) return context.skip('nothing may be mounted here');
    expect(tapwright(folder, 'design', small).status).toBe(0);
    const before = snapshot(join(folder, 'generated'));
    writeFileSync(join(folder, small), smallDocument(12));
    const ballast = join(folder, 'ballast');
    // What is left: enough for some of the files and not for all.
    const free = Number(spawnSync('stat', ['-f', '-c', '%a', folder], { encoding: 'utf8' }).stdout) - 6;
    writeFileSync(ballast, Buffer.alloc(4096 * free));
    expectNotWritable(tapwright(folder, 'design', small), /ENOSPC/);
    expect(snapshot(join(folder, 'generated'))).toEqual(before);
    rmSync(ballast);
    expect(tapwright(folder, 'design', small).status).toBe(0);
    expect(tapwright(folder, 'check', small).status).toBe(0);
  });

  it('is told by the limit on the size of a file too, and before the first files are there', () => {
    const folder = smallPairing();
    const limited = (blocks: number, ...args: string[]) => {
      const command = `ulimit -f ${blocks}; exec "$0" "$@"`;
      const run = spawnSync('bash', ['-c', command, process.execPath, cli, ...args], {
        cwd: folder,
        encoding: 'utf8',
      });
      return { status: run.status, out: run.stdout, err: run.stderr };
    };
    expectNotWritable(limited(4, 'design', small), /EFBIG/);
    expect([leftovers(folder), Object.keys(snapshot(folder)).sort()]).toEqual([[], ['a.csv', small]]);
    expect(tapwright(folder, 'design', small).status).toBe(0);
    const apply = ['apply', 'generated/case.taps.json', 'a.csv', '-o', 'o.wav'];
    expectNotWritable(limited(1, ...apply), /EFBIG/);
    expectNotWritable(limited(0, 'pair', 'a.csv', '--rate', '1000', '-o', 'new.pairing.json'), /EFBIG/);
    expect(readdirSync(folder).sort()).toEqual(['a.csv', small, 'generated']);
  });

  it('under standard output ends a command without a stack trace', () => {
    const folder = smallPairing();
    const run = spawnSync('bash', ['-c', '"$0" "$@" > /dev/full', process.execPath, cli, 'inspect', small], {
      cwd: folder,
      encoding: 'utf8',
    });
    expect(run.stderr).toMatch(/standard output.*ENOSPC/);
    expect(run.stderr).not.toMatch(/\n\s+at /);
    expect(run.status).toBe(2);
  });
});

describe.skipIf(process.platform !== 'linux')(
  'a folder that may not be written',
  { timeout: patience },
  () => {
    /** Somebody who owns nothing, where this process may become that. */
    const nobody = isRoot ? { uid: 65534, gid: 65534 } : {};

    /** Runs a copy of the command line as nobody: the project may lie where nobody can read. */
    function asNobody(folder: string, ...args: string[]) {
      const copy = join(emptyFolder(), 'cli.js');
      copyFileSync(cli, copy);
      chmodSync(join(copy, '..'), 0o755);
      chmodSync(copy, 0o755);
      const run = spawnSync(process.execPath, [copy, ...args], { cwd: folder, encoding: 'utf8', ...nobody });
      return { status: run.status, out: run.stdout, err: run.stderr };
    }

    function owned(): string {
      const folder = smallPairing();
      for (const name of ['', ...readdirSync(folder)]) {
        if (isRoot) chownSync(join(folder, name), 65534, 65534);
      }
      return folder;
    }

    it('is told, whether the folder of the document or the one written to', () => {
      const folder = owned();
      chmodSync(folder, 0o555);
      expectNotWritable(asNobody(folder, 'design', small), /EACCES/);
      chmodSync(folder, 0o755);
      expect(asNobody(folder, 'design', small).status).toBe(0);
      const before = snapshot(folder);
      expect(asNobody(folder, 'check', small).status).toBe(0);
      writeFileSync(join(folder, small), smallDocument(12));
      chmodSync(join(folder, 'generated'), 0o555);
      expectNotWritable(asNobody(folder, 'design', small), /EACCES/);
      expect(snapshot(join(folder, 'generated'))).toEqual(
        Object.fromEntries(
          Object.entries(before).flatMap(([name, bytes]) =>
            name.startsWith('generated/') ? [[name.slice('generated/'.length), bytes]] : [],
          ),
        ),
      );
      // Listed, but nothing in it can be looked at.
      chmodSync(join(folder, 'generated'), 0o444);
      expectNotWritable(asNobody(folder, 'design', small), /EACCES/);
    });

    it('is told by the other commands that write, and no hindrance to those that read', () => {
      const folder = owned();
      expect(asNobody(folder, 'design', small).status).toBe(0);
      mkdirSync(join(folder, 'closed'), { mode: 0o555 });
      const apply = ['apply', 'generated/case.taps.json', 'a.csv', '-o', 'closed/o.wav'];
      expectNotWritable(asNobody(folder, ...apply), /EACCES/);
      const pair = ['pair', 'a.csv', '--rate', '1000', '-o', 'closed/b.pairing.json'];
      expectNotWritable(asNobody(folder, ...pair), /EACCES/);
      chmodSync(folder, 0o555);
      expect(asNobody(folder, 'check', small).status).toBe(0);
      chmodSync(join(folder, 'a.csv'), 0);
      const { status, out } = asNobody(folder, 'check', small);
      expect([status, out]).toEqual([2, expect.stringContaining('[unreadable-file]')]);
    });
  },
);

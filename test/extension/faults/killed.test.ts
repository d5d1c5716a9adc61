import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { build } from 'esbuild';
import { beforeAll, describe, expect, it } from 'vitest';
import { newPace } from '../../../core/pace';
import { check } from '../../../core/pipeline/check';
import { newNodeHost } from '../../../extension/node/nodeHost';
import { emptyFolder, snapshot, tapwright } from '../../support/cli';
import {
  leftovers,
  patience,
  runScript,
  small,
  smallDocument,
  smallPairing,
  withFault,
} from './smallPairing';

// Writing killed by SIGKILL before each of its calls of the file system, and half way through each write.

const written = (folder: string) => join(folder, 'generated');

describe('a writer that is killed at any step', { timeout: patience }, () => {
  let folder: string;
  let writer: string;
  let list: string;
  let older: Record<string, string>;
  let newer: Record<string, string>;
  let names: string[];

  beforeAll(async () => {
    folder = smallPairing();
    const place = emptyFolder();
    [writer, list] = [join(place, 'writer.js'), join(place, 'files.json')];
    await build({
      entryPoints: [join(__dirname, 'writer.ts')],
      bundle: true,
      platform: 'node',
      outfile: writer,
      logLevel: 'warning',
    });
    const design = (length: number) => {
      writeFileSync(join(folder, small), smallDocument(length));
      expect(tapwright(folder, 'design', small).status).toBe(0);
      return snapshot(written(folder));
    };
    older = design(8);
    newer = design(12);
    // One picture stands for all: the others are there already.
    for (const name of Object.keys(newer)
      .filter((one) => one.endsWith('.svg'))
      .slice(1))
      older[name] = newer[name];
    const last = 'case.taps.json';
    names = [...Object.keys(newer).filter((name) => name !== last), last];
    const files = Object.fromEntries(names.map((name) => [`generated/${name}`, newer[name]]));
    writeFileSync(list, JSON.stringify(files));
  });

  const killedAt = (at: number, before: Record<string, string>) => {
    rmSync(written(folder), { recursive: true, force: true });
    for (const [name, base64] of Object.entries(before)) {
      mkdirSync(dirname(join(written(folder), name)), { recursive: true });
      writeFileSync(join(written(folder), name), base64, 'base64');
    }
    return runScript(folder, { of: 'writes', at, signal: 'SIGKILL' }, writer, folder, list);
  };

  const checked = async () => {
    const host = newNodeHost(folder, newPace());
    const { state, findings } = await check(host, smallDocument(12), { file: small, folder: '' });
    await host.close();
    return `${state} ${[...new Set(findings.map(({ code }) => code))].sort()}`;
  };

  it('leaves each file old or new, and what it leaves is told as stale until all are new', async () => {
    const told = new Map<number, string>();
    let at = 1;
    for (; ; at++) {
      const { signal, status, out } = killedAt(at, older);
      if (signal === null) {
        expect([status, out]).toEqual([0, '[]\n']);
        break;
      }
      expect(signal).toBe('SIGKILL');
      const beside = leftovers(folder);
      expect(beside.every((name) => /^generated\/case.+\.\d+\.\d+\.tmp$/.test(name))).toBe(true);
      const now = snapshot(written(folder));
      expect(Object.keys(now).length).toBe(names.length + beside.length);
      for (const name of names) expect([older[name], newer[name]], name).toContain(now[name]);
      const renewed = names.filter((name) => now[name] === newer[name]).length;
      if (told.has(renewed)) continue;
      told.set(renewed, await checked());
    }
    const changed = names.filter((name) => older[name] !== newer[name]);
    // Folder, clearing, open, write, flush and close of each file, then its rename.
    expect(at).toBeGreaterThan(7 * changed.length);
    const first = names.length - changed.length;
    const mixed = changed.map((_, k) => [first + k, 'failed edited,stale-document']);
    expect([...told]).toEqual([...mixed, [names.length, 'current ']]);
  });

  it('leaves no list of files the first time until all the others are there', () => {
    // Some steps: each was seen above.
    for (let at = 1; ; at += 7) {
      if (killedAt(at, {}).signal === null) break;
      const there = existsSync(written(folder)) ? Object.keys(snapshot(written(folder))) : [];
      const missing = names.filter((name) => !there.includes(name));
      expect(missing.length === 0 || missing.includes('case.taps.json'), missing.join()).toBe(true);
    }
  });
});

describe('the command line', { timeout: patience }, () => {
  it('killed while it writes is found unfinished by check, and design finishes', () => {
    const folder = smallPairing();
    expect(withFault(folder, { of: 'writes', at: 9, signal: 'SIGKILL' }, 'design', small).signal).toBe(
      'SIGKILL',
    );
    expect(leftovers(folder).length).toBeGreaterThan(0);
    const { status, out } = tapwright(folder, 'check', small);
    expect([status, out]).toEqual([1, expect.stringContaining('[not-written]')]);
    expect(tapwright(folder, 'design', small).status).toBe(0);
    expect(leftovers(folder)).toEqual([]);
    expect(tapwright(folder, 'check', small).status).toBe(0);
  });

  it('removes only what a writer left that is gone', () => {
    const folder = smallPairing();
    expect(tapwright(folder, 'design', small).status).toBe(0);
    const alive = `case.note.md.${process.pid}.1.tmp`;
    const others = ['case.note.md.tmp', 'mine.4194305.1.tmp', alive];
    // Above the largest process id that Linux gives.
    for (const name of ['case.note.md.4194305.1.tmp', ...others])
      writeFileSync(join(written(folder), name), 'half');
    expect(tapwright(folder, 'design', small).status).toBe(0);
    expect(leftovers(folder).sort()).toEqual(others.map((name) => `generated/${name}`).sort());
    expect(readFileSync(join(written(folder), alive), 'utf8')).toBe('half');
  });
});

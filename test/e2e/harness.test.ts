import { mkdtempSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it, vi } from 'vitest';
import { folderCalls, refusalOf } from './support/folderCalls';
import { packageFiles } from './support/packageFiles';
import { SecondTries } from './support/secondTries';
import { tryTwice } from './support/tryTwice';
import { until } from './support/until';

// The harness itself, without a browser.

const folder = () => mkdtempSync(join(tmpdir(), 'tapwright-harness-'));

describe('the file calls of the server', () => {
  const call = async (root: string, name: string, parameters: Record<string, string>, body = '') =>
    folderCalls(root)[name](new URLSearchParams(parameters), Buffer.from(body)).catch(refusalOf);

  it('write, list, rename and remove real files', async () => {
    const root = folder();
    await call(root, 'write', { path: '/a/b.txt', create: 'true', overwrite: 'false' }, 'one');
    symlinkSync(join(root, 'a', 'b.txt'), join(root, 'link'));
    expect(await call(root, 'read', { path: '/a/b.txt' })).toEqual(Buffer.from('one'));
    expect(await call(root, 'list', { path: '/' })).toEqual([
      ['a', 2],
      ['link', 65],
    ]);
    const again = { path: '/a/b.txt', create: 'true', overwrite: 'false' };
    expect(await call(root, 'write', again, 'two')).toBe('FileExists');
    expect(await call(root, 'read', { path: '/none' })).toBe('FileNotFound');
    await call(root, 'rename', { path: '/a/b.txt', to: '/a/c.txt', overwrite: 'false' });
    expect(Object.keys((await call(root, 'tree', { path: '/a' })) as object)).toEqual(['/a/c.txt']);
    await call(root, 'remove', { path: '/a', recursive: 'true' });
    expect(await call(root, 'stat', { path: '/a' })).toBe('FileNotFound');
  });

  it('do not leave their folder', async () => {
    const root = folder();
    writeFileSync(join(root, 'inside'), 'inside');
    expect(await call(root, 'read', { path: '/../../../../etc/passwd' })).toBe('FileNotFound');
    expect(await call(root, 'read', { path: '/../inside' })).toEqual(Buffer.from('inside'));
  });
});

describe('the files that are served', () => {
  it('are those that the manifest lists', () => {
    const root = folder();
    const files = ['dist/web', 'dist/*.css', 'media/**', '!media/secret.csv'];
    writeFileSync(join(root, 'package.json'), JSON.stringify({ files }));
    const held = packageFiles(root);
    const served = [
      'package.json',
      'package.nls.de.json',
      'dist/web/worker.js',
      'dist/page.css',
      'media/bench/a.csv',
    ];
    expect(served.filter((path) => !held(path))).toEqual([]);
    const kept = [
      'dist/cli.js',
      'dist/webs.js',
      'media/secret.csv',
      'core/pace.ts',
      'node_modules/x/package.json',
    ];
    expect(kept.filter(held)).toEqual([]);
  });
});

describe('a second try', () => {
  /** Fails the first so many times. */
  const failing = (times: number) => async () => {
    if (times-- > 0) throw new Error('not now');
  };
  const once = (name: string, times: number, tries: SecondTries) =>
    tryTwice(name, failing(times), async () => 'cleared', tries);

  it('is granted to one flow of a run, and told', async () => {
    const warn = vi.spyOn(console, 'warn').mockImplementation(() => {});
    const tries = new SecondTries('run', folder());
    await once('calm', 0, tries);
    await once('first', 1, tries);
    expect(tries.list()).toEqual(['first']);
    expect(warn).toHaveBeenCalledExactlyOnceWith(expect.stringContaining('passed on the second try: first'));
    await expect(once('second', 1, tries)).rejects.toThrow(
      'more than one flow needed a second try: first; second',
    );
  });

  it('does not pass what fails twice', async () => {
    const tries = new SecondTries('run', folder());
    await expect(once('broken', 2, tries)).rejects.toThrow('broken failed twice');
    expect(tries.list()).toEqual([]);
  });

  it('forgets runs that are over', () => {
    const tries = new SecondTries('run', folder());
    tries.add('long ago', Date.now() - 60 * 60_000);
    expect(tries.list()).toEqual([]);
  });
});

describe('waiting', () => {
  it('ends with the answer, or with what was waited for', async () => {
    let asked = 0;
    expect(await until('three', () => ++asked === 3 && asked)).toBe(3);
    await expect(until('rain', () => false, 60)).rejects.toThrow('waited 0.06 s for rain');
  });
});

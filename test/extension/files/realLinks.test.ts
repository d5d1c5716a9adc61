import {
  lstatSync,
  mkdirSync,
  readdirSync,
  renameSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { beforeEach, describe, expect, it } from 'vitest';
import { type FolderReader, hostCalls } from '../../../extension/files/hostCalls';
import { fileTypes, leadsOverLink } from '../../../extension/files/linkCheck';
import { emptyFolder } from '../../support/cli';

// Reading through the workbench's file systems, on real links of a real disk. The reader tells what such file systems tell:
// listings mark links, everything else follows them.

let root: string;
let secret: string;
let calls: ReturnType<typeof hostCalls>;
let now: number;
const uri = 'disk:/';

const typeOf = (path: string): number => {
  const target = statSync(path, { throwIfNoEntry: false });
  const kind = target === undefined ? 0 : target.isDirectory() ? fileTypes.folder : fileTypes.file;
  return lstatSync(path).isSymbolicLink() ? kind | fileTypes.link : kind;
};

beforeEach(() => {
  const place = emptyFolder();
  root = join(place, 'workspace');
  secret = join(place, 'secret');
  for (const folder of [root, secret, join(root, 'takes')]) mkdirSync(folder);
  writeFileSync(join(secret, 'key.csv'), 'secret');
  writeFileSync(join(root, 'takes', 'a.csv'), 'own');
  now = 0;
  const at = (address: string) => join(root, address.slice(uri.length));
  const reader: FolderReader = {
    async stat(address) {
      const { size, mtimeMs } = statSync(at(address));
      return { type: typeOf(at(address)) & ~fileTypes.link, size, mtime: mtimeMs };
    },
    list: async (address) =>
      readdirSync(at(address)).map((name) => [name, typeOf(join(at(address), name))] as const),
    read: (address) => readFile(at(address)),
    join: (address, path) => address + path,
    missing: (error) => (error as NodeJS.ErrnoException).code === 'ENOENT',
  };
  calls = hostCalls(reader, () => now);
});

const stat = async (path: string) => {
  const told = await calls.stat({ uri, path });
  return typeof told === 'string' ? told : 'readable';
};

describe('a path through the host', () => {
  it('reads a file of the root', async () => {
    expect(await stat('takes/a.csv')).toBe('readable');
    expect(Buffer.from(await calls.read({ uri, path: 'takes/a.csv' })).toString()).toBe('own');
  });

  it.each<[string, () => void, string]>([
    ['a link to a file', () => symlinkSync(join(secret, 'key.csv'), join(root, 'link.csv')), 'link.csv'],
    ['a link to a folder', () => symlinkSync(secret, join(root, 'linked')), 'linked/key.csv'],
    ['a link deep down', () => symlinkSync(secret, join(root, 'takes', 'up')), 'takes/up/key.csv'],
    ['a relative link', () => symlinkSync('../secret', join(root, 'linked')), 'linked/key.csv'],
    [
      'a link to a link',
      () => {
        symlinkSync(secret, join(root, 'first'));
        symlinkSync('first', join(root, 'second'));
      },
      'second/key.csv',
    ],
    ['a link to the root itself', () => symlinkSync('.', join(root, 'self')), 'self/takes/a.csv'],
    ['a link that leads nowhere', () => symlinkSync('none', join(root, 'dead.csv')), 'dead.csv'],
  ])('does not follow %s', async (_, make, path) => {
    make();
    expect(await stat(path)).toBe('outside');
    await expect(calls.read({ uri, path })).rejects.toThrow('leaves its root');
  });

  it.each([
    '../secret/key.csv',
    'takes/../../secret/key.csv',
    '..',
    '..\\secret\\key.csv',
    'takes\\..\\..\\x',
  ])('does not leave by %s', async (path) => {
    expect(await stat(path)).toBe('outside');
    await expect(calls.read({ uri, path })).rejects.toThrow('leaves its root');
  });

  it.each([
    '/etc/hostname',
    'C:/secret/key.csv',
    'file:///etc/hostname',
    'https://example.org/a.csv',
    '~/a.csv',
  ])('takes %s for a name below the root', async (path) => {
    expect(await stat(path)).toBe('missing');
  });

  it('takes no link that came after it was asked about', async () => {
    expect(await stat('takes/a.csv')).toBe('readable');
    rmSync(join(root, 'takes', 'a.csv'));
    symlinkSync(join(secret, 'key.csv'), join(root, 'takes', 'a.csv'));
    now = 5000;
    await expect(calls.read({ uri, path: 'takes/a.csv' })).rejects.toThrow('leaves its root');
  });

  it('finds a folder again that was a link before', async () => {
    symlinkSync(secret, join(root, 'linked'));
    expect(await stat('linked/key.csv')).toBe('outside');
    rmSync(join(root, 'linked'));
    renameSync(secret, join(root, 'linked'));
    now = 5000;
    expect(await stat('linked/key.csv')).toBe('readable');
  });
});

describe('a name that the file system takes for another', () => {
  const { file, folder, link } = fileTypes;
  const entries: Record<string, [string, number][]> = {
    '': [
      ['Linked', folder | link],
      ['caf\u00e9.csv', file | link],
      ['Takes', folder],
      ['stra\u00dfe.csv', file | link],
    ],
    Takes: [['Deep.csv', file | link]],
  };
  const list = async (path: string) => entries[path] ?? Promise.reject(new Error('none'));

  it.each(['linked/a.csv', 'LINKED', 'cafe\u0301.csv', 'takes/deep.csv', 'TAKES/Deep.csv', 'STRASSE.csv'])(
    'leads over a link as %j does',
    async (path) => {
      expect(await leadsOverLink(list, path)).toBe(true);
    },
  );

  it('is not confused with one that is there as it is written', async () => {
    const both = async () =>
      [
        ['a.csv', file],
        ['A.csv', file | link],
      ] as const;
    expect([await leadsOverLink(both, 'a.csv'), await leadsOverLink(both, 'A.csv')]).toEqual([false, true]);
    expect(await leadsOverLink(list, 'other.csv')).toBe(false);
  });
});

import { describe, expect, it } from 'vitest';
import { fileTypes } from '../../../extension/files/linkCheck';
import { listRecordings } from '../../../extension/files/listRecordings';
import { nameOf, pathBelow, relativePath, stemOf } from '../../../extension/files/relativePath';

describe('paths', () => {
  it('lead from a folder to a file', () => {
    expect(relativePath('/a/b', '/a/b/c.csv')).toBe('c.csv');
    expect(relativePath('/a/b', '/a/c/d.csv')).toBe('../c/d.csv');
    expect(relativePath('/', '/a.csv')).toBe('a.csv');
    expect(relativePath('/a', '/a')).toBe('');
    expect(relativePath('/a/b', '/a/bc.csv')).toBe('../bc.csv');
  });

  it('lie in a folder or not', () => {
    expect(pathBelow('/a', '/a/b/c')).toBe('b/c');
    expect(pathBelow('/a', '/ab')).toBeNull();
    expect(pathBelow('/a/b', '/a')).toBeNull();
    expect(pathBelow('/a', '/a/..b')).toBe('..b');
  });

  it('have a name and a stem', () => {
    expect([nameOf('a/b.csv'), nameOf('b.csv')]).toEqual(['b.csv', 'b.csv']);
    expect(['a/belt.pairing.json', 'belt.CSV', 'be.lt.wav', 'belt'].map(stemOf)).toEqual([
      'belt',
      'belt',
      'be.lt',
      'belt',
    ]);
  });
});

describe('recordings below a folder', () => {
  const { file, folder, link } = fileTypes;
  const tree: Record<string, [string, number][]> = {
    '': [
      ['takes', folder],
      ['z.WAV', file],
      ['a.csv', file],
      ['notes.md', file],
      ['x.npy', file | link],
      ['.git', folder],
      ['node_modules', folder],
      ['closed', folder],
    ],
    takes: [
      ['b.npy', file],
      ['deeper', folder],
    ],
    'takes/deeper': [['c.tsv', file]],
    '.git': [['d.wav', file]],
    node_modules: [['e.wav', file]],
  };
  const list = async (path: string) => tree[path] ?? Promise.reject(new Error('no permission'));

  it('are listed by name, those near before those deep down', async () => {
    expect(await listRecordings(list)).toEqual(['a.csv', 'z.WAV', 'takes/b.npy', 'takes/deeper/c.tsv']);
  });

  it('are not listed without end', async () => {
    expect(await listRecordings(list, { depth: 1, files: 10 })).toEqual(['a.csv', 'z.WAV', 'takes/b.npy']);
    expect(await listRecordings(list, { depth: 9, files: 2 })).toEqual(['a.csv', 'z.WAV']);
  });
});

import { describe, expect, it } from 'vitest';
import { type FolderReader, hostCalls, largestWhole } from '../../../extension/files/hostCalls';
import { fileTypes } from '../../../extension/files/linkCheck';

const missing = new Error('missing');

/** A root `bench:/` with two recordings, links of three kinds and something that may not be read. */
function newReader() {
  const entries: Record<string, [string, number][]> = {
    '': [
      ['a.wav', fileTypes.file],
      ['large.wav', fileTypes.file],
      ['secret.wav', fileTypes.file],
      ['link.wav', fileTypes.file | fileTypes.link],
      ['linked', fileTypes.folder | fileTypes.link],
      ['takes', fileTypes.folder],
    ],
    takes: [['b.wav', fileTypes.file]],
    linked: [['c.wav', fileTypes.file]],
  };
  const listed: string[] = [];
  const read: string[] = [];
  const reader: FolderReader = {
    async stat(address) {
      const path = address.slice('bench:/'.length);
      if (path === 'secret.wav') throw new Error('no permission');
      if (path === 'large.wav') return { type: fileTypes.file, size: largestWhole + 1, mtime: 1 };
      if (path === 'takes') return { type: fileTypes.folder, size: 0, mtime: 1 };
      if (!['a.wav', 'takes/b.wav', 'linked/c.wav', 'link.wav'].includes(path)) throw missing;
      return { type: fileTypes.file, size: 10, mtime: 7 };
    },
    async list(address) {
      const path = address.slice('bench:/'.length);
      listed.push(path);
      return entries[path] ?? Promise.reject(missing);
    },
    async read(address) {
      read.push(address);
      return Buffer.from('pooled');
    },
    join: (address, path) => `${address}${path}`,
    missing: (error) => error === missing,
  };
  return { reader, listed, read };
}

const stat = (path: string, { reader } = newReader()) => hostCalls(reader).stat({ uri: 'bench:/', path });

describe("reading through the workbench's file systems", () => {
  it('tells size and a stamp that follows size and time', async () => {
    expect(await stat('a.wav')).toEqual({ size: 10, stamp: '7 10' });
    expect(await stat('takes/b.wav')).toEqual({ size: 10, stamp: '7 10' });
  });

  it('says why a file cannot be read', async () => {
    expect(await stat('none.wav')).toBe('missing');
    expect(await stat('takes')).toBe('not-a-file');
    expect(await stat('secret.wav')).toBe('unreadable');
    expect(await stat('large.wav')).toBe('too-large');
  });

  it('follows no link, also not on the way, and leaves the root by no name', async () => {
    expect(await stat('link.wav')).toBe('outside');
    expect(await stat('linked/c.wav')).toBe('outside');
    expect(await stat('takes/../../x.wav')).toBe('outside');
    await expect(hostCalls(newReader().reader).read({ uri: 'bench:/', path: '../x.wav' })).rejects.toThrow();
  });

  it('lists a folder once for several files, and again after a while', async () => {
    const { reader, listed } = newReader();
    let now = 0;
    const calls = hostCalls(reader, () => now);
    await calls.stat({ uri: 'bench:/', path: 'a.wav' });
    await calls.stat({ uri: 'bench:/', path: 'large.wav' });
    expect(listed).toEqual(['']);
    now = 5000;
    await calls.stat({ uri: 'bench:/', path: 'a.wav' });
    expect(listed).toEqual(['', '']);
  });

  it('gives bytes in a buffer of their own', async () => {
    const bytes = await hostCalls(newReader().reader).read({ uri: 'bench:/', path: 'a.wav' });
    expect(Buffer.isBuffer(bytes)).toBe(false);
    expect([bytes.byteOffset, bytes.buffer.byteLength]).toEqual([0, 6]);
  });
});

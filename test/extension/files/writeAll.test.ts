import { describe, expect, it } from 'vitest';
import { markLine } from '../../../core/files/generatedMark';
import { type Disk, DiskError } from '../../../extension/files/disk';
import { writeAll } from '../../../extension/files/writeAll';

const bytes = (text: string) => new TextEncoder().encode(text);
const mark = markLine({ document: 'belt.pairing.json', digest: 'a'.repeat(64) }, 'c');
const ours = (text: string) => bytes(`${mark}\n${text}`);

/** A disk in memory that fails where it is told to, and remembers the order of its renames. */
function newDisk(start: Record<string, Uint8Array> = {}) {
  const files = new Map(Object.entries(start));
  const renamed: string[] = [];
  const fails = new Set<string>();
  const may = (what: string, path: string) => {
    if (fails.has(`${what} ${path}`)) throw new DiskError('ENOSPC', path);
  };
  const disk: Disk = {
    staysInside: async (path) => !path.startsWith('..'),
    stat: async (path) => (path === 'folder' ? 'other' : files.has(path) ? 'file' : 'missing'),
    async read(path) {
      may('read', path);
      return files.get(path)!;
    },
    async makeFolder() {},
    beside: (path) => `${path}.tmp`,
    async tidy() {},
    async write(path, content) {
      may('write', path);
      files.set(path, content);
    },
    async rename(from, to) {
      may('rename', to);
      files.set(to, files.get(from)!);
      files.delete(from);
      renamed.push(to);
    },
    async remove(path) {
      files.delete(path);
    },
  };
  return { disk, files, renamed, fails };
}

const design = (text: string) => [
  { path: 'out/belt_taps.h', bytes: ours(text) },
  { path: 'out/belt.note.md', bytes: ours(`${text}, note`) },
  { path: 'out/belt.taps.json', bytes: ours(`${text}, last`) },
];

describe('writing a design', () => {
  it('puts every file in place in the order given and leaves nothing beside them', async () => {
    const { disk, files, renamed } = newDisk();
    const { files: written, findings } = await writeAll(disk, design('one'));
    expect(findings).toEqual([]);
    expect(written.map(({ change }) => change)).toEqual(['new', 'new', 'new']);
    expect(renamed).toEqual(design('').map(({ path }) => path));
    expect([...files.keys()].sort()).toEqual([...renamed].sort());
  });

  it('writes over no link beside its target, and gives up where there are too many', async () => {
    const { disk, files } = newDisk();
    let [names, links] = [0, 2];
    const linked: Disk = {
      ...disk,
      beside: (path) => `${path}.${++names}.tmp`,
      staysInside: async (path) => !path.endsWith('.tmp') || names > links,
    };
    expect((await writeAll(linked, design('one').slice(0, 1))).findings).toEqual([]);
    expect([names, [...files.keys()]]).toEqual([3, ['out/belt_taps.h']]);
    links = Number.POSITIVE_INFINITY;
    const { findings } = await writeAll(linked, design('two'));
    expect(findings.map(({ code }) => code)).toEqual(['outside-root']);
    expect(files.get('out/belt_taps.h')).toEqual(ours('one'));
  });

  it('touches only what changed', async () => {
    const { disk, renamed } = newDisk({ 'out/belt_taps.h': ours('one'), 'out/belt.note.md': ours('old') });
    const { files } = await writeAll(disk, design('one'));
    expect(files.map(({ change }) => change)).toEqual(['unchanged', 'changed', 'new']);
    expect(renamed).toEqual(['out/belt.note.md', 'out/belt.taps.json']);
  });

  it('writes nothing where one file is not ours, is no file or lies outside', async () => {
    const { disk, files } = newDisk({ 'out/belt.note.md': bytes('my own notes') });
    const { findings } = await writeAll(disk, [
      ...design('one'),
      { path: '../x.h', bytes: ours('') },
      { path: 'folder', bytes: ours('') },
    ]);
    expect(findings.map(({ code, file }) => `${code} ${file}`)).toEqual([
      'foreign-file out/belt.note.md',
      'outside-root ../x.h',
      'foreign-file folder',
    ]);
    expect([...files.keys()]).toEqual(['out/belt.note.md']);
  });

  it('leaves every old file where one cannot be written', async () => {
    const old = { 'out/belt_taps.h': ours('old'), 'out/belt.taps.json': ours('old') };
    const { disk, files, fails } = newDisk(old);
    fails.add('write out/belt.taps.json.tmp');
    const { findings } = await writeAll(disk, design('one'));
    expect(findings.map(({ code, values }) => [code, values.error])).toEqual([['not-writable', 'ENOSPC']]);
    expect(Object.fromEntries(files)).toEqual(old);
  });

  it('leaves the old list of digests where a rename fails half way', async () => {
    const { disk, files, fails } = newDisk({ 'out/belt.taps.json': ours('old') });
    fails.add('rename out/belt.note.md');
    const { findings } = await writeAll(disk, design('one'));
    expect(findings.map(({ code }) => code)).toEqual(['not-writable']);
    expect(files.get('out/belt.taps.json')).toEqual(ours('old'));
    expect([...files.keys()].filter((path) => path.endsWith('.tmp'))).toEqual([]);
  });

  it('says so where a file that is there cannot be read, and throws a bug', async () => {
    const { disk, fails } = newDisk({ 'out/belt_taps.h': ours('old') });
    fails.add('read out/belt_taps.h');
    expect((await writeAll(disk, design('one'))).findings.map(({ code }) => code)).toEqual(['not-writable']);
    const broken: Disk = { ...disk, stat: () => Promise.reject(new TypeError('bug')) };
    await expect(writeAll(broken, design('one'))).rejects.toThrow('bug');
  });
});

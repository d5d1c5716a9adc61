import { describe, expect, it } from 'vitest';
import { memorySource } from '../../../core/bytes/byteSource';
import { designFiles } from '../../../core/files/designFiles';
import { Refusal } from '../../../core/findings/finding';
import { check } from '../../../core/pipeline/check';
import { design } from '../../../core/pipeline/design';
import type { Host } from '../../../core/pipeline/host';
import { nothingSeen, stillStands, writtenState } from '../../../core/pipeline/writtenState';
import { csvOf, memoryHost } from '../../support/memoryHost';
import { nodeSha256 } from '../../support/nodeSha256';
import { seededUniform } from '../../support/random';

const place = { file: 'path.pairing.json', folder: 'fir' };

const uniform = seededUniform(7);
const x = Float64Array.from({ length: 4000 }, () => uniform() - 0.5);
const d = x.map((_, n) => 0.5 * x[n] + 0.25 * (x[n - 1] ?? 0) + 0.001 * (uniform() - 0.5));

function documentText(change: Record<string, unknown> = {}): string {
  const take = {
    inputs: [{ file: 'both.csv', channel: 'x' }],
    desired: { file: 'both.csv', channel: 'd' },
    fit: { from: 0, to: 3 },
    heldOut: { from: 3, to: 4 },
  };
  return JSON.stringify({
    pairing: 1,
    job: 'identify',
    title: 'Path',
    sampleRate: 1000,
    takes: [take],
    filter: { length: 4 },
    write: { folder: 'generated', symbol: 'path' },
    ...change,
  });
}

type Files = Record<string, string | Uint8Array>;

/** The files of a design, by their paths from the root. */
async function written(change: Record<string, unknown> = {}): Promise<Files> {
  const files: Files = {
    'fir/path.pairing.json': documentText(change),
    'fir/both.csv': csvOf({ x, d }),
  };
  const outcome = await design(memoryHost(files), documentText(change), place);
  if (outcome.result === null) throw new Error('no design');
  for (const { path, bytes } of designFiles(outcome.result, nodeSha256)) files[`fir/${path}`] = bytes;
  return files;
}

/** A host that counts what is read, with a stamp for each file. */
function countingHost(files: Files, stamps: Record<string, string> = {}) {
  const read: string[] = [];
  const host: Host = {
    ...memoryHost(files),
    async open(path) {
      if (!Object.hasOwn(files, path)) return 'missing';
      const content = files[path];
      const source = memorySource(typeof content === 'string' ? new TextEncoder().encode(content) : content);
      return {
        ...source,
        stamp: stamps[path] ?? '1',
        read(offset, length) {
          if (read.at(-1) !== path) read.push(path);
          return source.read(offset, length);
        },
      };
    },
  };
  return { host, read };
}

const look = (files: Files, seen = nothingSeen) => writtenState(countingHost(files).host, place, seen);

describe('the state of written files by digests', async () => {
  const files = await written();

  it('is current, names what was written, and agrees with a whole check', async () => {
    const state = await look(files);
    expect(state).toMatchObject({
      state: 'current',
      symbol: 'path',
      tapsFile: 'fir/generated/path.taps.json',
      overLimit: [],
    });
    expect(state.others).toContain('fir/generated/path_taps.h');
    expect(Object.keys(state.seen.stamps).sort()).toEqual(Object.keys(files).sort());
    expect(state.seen.sizes).toEqual({ 'fir/both.csv': String(files['fir/both.csv']).length });
    expect((await check(memoryHost(files), documentText(), place)).state).toBe('current');
  });

  it.each([
    ['recording-changed', { 'fir/both.csv': csvOf({ x, d: x }) }],
    ['document-changed', { 'fir/path.pairing.json': documentText({ filter: { length: 5 } }) }],
    ['edited', { 'fir/generated/path_taps.h': 'int path_taps[1];' }],
    ['bad-input', { 'fir/path.pairing.json': '{' }],
    ['bad-input', { 'fir/generated/path.taps.json': '{}' }],
  ] as [string, Files][])('is %s', async (word, changed) => {
    const now: Files = { ...files, ...changed };
    expect((await look(now)).state).toBe(word);
    const text = String(now['fir/path.pairing.json']);
    expect((await check(memoryHost(now), text, place)).state).not.toBe('current');
  });

  it.each([
    ['not-written', 'fir/generated/path.taps.json'],
    ['not-written', 'fir/generated/path_taps.h'],
    ['bad-input', 'fir/both.csv'],
    ['bad-input', 'fir/path.pairing.json'],
  ])('is %s without %s', async (word, path) => {
    const { [path]: _, ...rest } = files;
    expect((await look(rest)).state).toBe(word);
  });

  it('is current whatever the line ends of texts', async () => {
    const crlf = (path: string) => {
      const content = files[path];
      const text = typeof content === 'string' ? content : new TextDecoder().decode(content);
      return [path, text.replaceAll('\n', '\r\n')];
    };
    const now = Object.fromEntries(Object.keys(files).map(crlf));
    expect((await look(now)).state).toBe('current');
  });

  it('says that a limit is exceeded, as the taps file does', async () => {
    const over = await written({ limits: { heldOutNmse: -200 } });
    const state = await look(over);
    expect(state.state).toBe('over-limit');
    expect(state.overLimit[0]).toMatch(/-200/);
  });

  it('places a missing recording in the document and remembers its size', async () => {
    const { seen } = await look(files);
    const { 'fir/both.csv': _, ...rest } = files;
    const state = await look(rest, seen);
    const missing = state.findings.find(({ code }) => code === 'missing-file');
    expect(missing?.path).toEqual(['takes', 0, 'inputs', 0, 'file']);
    expect(state.seen.sizes).toEqual(seen.sizes);
    // What was written is still known, so that it can be told apart from other files.
    expect(state.others).toContain('fir/generated/path_taps.h');
  });

  it('reads nothing while every stamp stands, and only what changed of the recordings', async () => {
    const { seen } = await look(files);
    const idle = countingHost(files);
    expect(await stillStands(idle.host, seen)).toBe(true);
    expect(idle.read).toEqual([]);
    expect(await stillStands(idle.host, nothingSeen)).toBe(false);

    const stamps = { 'fir/path.pairing.json': '2' };
    expect(await stillStands(countingHost(files, stamps).host, seen)).toBe(false);
    const touched = countingHost(files, stamps);
    expect((await writtenState(touched.host, place, seen)).state).toBe('current');
    expect(touched.read).not.toContain('fir/both.csv');
    const other = countingHost(files, { 'fir/both.csv': '2' });
    await writtenState(other.host, place, seen);
    expect(other.read).toContain('fir/both.csv');
  });

  it('never stands where changes cannot be told', async () => {
    const host = memoryHost(files);
    const { seen } = await writtenState(host, place, nothingSeen);
    expect(await stillStands(host, seen)).toBe(false);
  });

  it('throws no refusal for a file that cannot be read', async () => {
    const { host } = countingHost(files);
    const locked: Host = { ...host, open: async (p) => (p.endsWith('.h') ? 'unreadable' : host.open(p)) };
    const state = await writtenState(locked, place, nothingSeen).catch((error) => error);
    expect(state).not.toBeInstanceOf(Refusal);
    expect(state.state).toBe('bad-input');
  });
});

import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { newPace } from '../../../../core/pace';
import { openRecording } from '../../../../core/recordings/openRecording';
import { needs, python } from '../../../support/programs';
import { strictSource } from '../../../support/wavBytes';

// Arrays that NumPy writes; what they hold comes back from NumPy as text.

interface Case {
  type: string;
  shape: number[];
  order?: 'C' | 'F';
  /** Of the header; NumPy's own choice where it is left out. */
  version?: [number, number];
}

/** Writes each case and prints its channels, turned to [channel][sample]. */
const script = `
import json, sys, numpy
from numpy.lib import format
rng = numpy.random.default_rng(3)
found = []
for n, case in enumerate(json.loads(sys.argv[2])):
    kind = numpy.dtype(case['type'])
    if kind.kind == 'f':
        values = rng.standard_normal(case['shape']).astype(kind)
    else:
        limits = numpy.iinfo(kind)
        values = rng.integers(limits.min, limits.max, case['shape'], endpoint=True).astype(kind)
        values.flat[0], values.flat[1] = limits.min, limits.max
    values = numpy.asarray(values, order=case.get('order', 'C'))
    version = tuple(case['version']) if 'version' in case else None
    with open(f'{sys.argv[1]}/{n}.npy', 'wb') as file:
        format.write_array(file, values, version)
    planes = values[None, :] if values.ndim == 1 else values if values.shape[0] < values.shape[1] else values.T
    found.append(planes.astype(float).tolist())
print(json.dumps(found))`;

const types = ['f4', 'f8', 'i1', 'i2', 'i4', 'u1', 'u2', 'u4'];
const shapes: [number[], 'C' | 'F'][] = [
  [[50], 'C'],
  [[50, 3], 'C'],
  [[50, 3], 'F'],
  [[3, 50], 'C'],
  [[3, 50], 'F'],
];
const cases: Case[] = [
  ...types.flatMap((type) =>
    ['<', '>'].flatMap((end) => shapes.map(([shape, order]) => ({ type: end + type, shape, order }))),
  ),
  ...[1, 2, 3].map((major): Case => ({ type: '<f8', shape: [30, 2], version: [major, 0] })),
  { type: '<f8', shape: [7, 7] },
  { type: '<f8', shape: [7, 7], order: 'F' },
  { type: '<i2', shape: [20, 1] },
  { type: '<i2', shape: [1, 20] },
  { type: '<i2', shape: [2, 1] },
  { type: '>i2', shape: [2] },
  { type: '<f4', shape: [1025, 1024] },
  // Planes and frames beyond one block of 256 KiB.
  { type: '<f8', shape: [70_000, 2] },
  { type: '<f8', shape: [2, 70_000] },
];

const folder = mkdtempSync(join(tmpdir(), 'npy-'));
afterAll(() => rmSync(folder, { recursive: true }));

const there = needs('scipy');
const wanted: number[][][] = there
  ? JSON.parse(
      execFileSync(python, ['-W', 'ignore', '-c', script, folder, JSON.stringify(cases)], {
        maxBuffer: 1 << 28,
      }).toString(),
    )
  : [];
const bytesOf = (n: number) => new Uint8Array(readFileSync(join(folder, `${n}.npy`)));
const names: Record<string, string> = { f: 'float', i: 'int', u: 'uint' };

describe.skipIf(!there)('an array of NumPy', () => {
  it.each(
    cases.map((c, n) => [
      `${c.type} of ${c.shape}, order ${c.order ?? 'C'}, version ${c.version ?? 'free'}`,
      n,
    ]),
  )('%s', async (_, at) => {
    const n = at as number;
    const { type, version, shape } = cases[n];
    const bytes = bytesOf(n);
    if (version) expect([bytes[6], bytes[7]]).toEqual(version);
    const { recording, findings } = await openRecording(strictSource(bytes), 'a.npy', newPace());
    if (recording === null) throw new Error(JSON.stringify(findings));
    expect(findings).toEqual([]);
    const samples = Math.max(...shape);
    const channels = new Array(wanted[n].length).fill(null);
    expect(recording).toMatchObject({
      sampleRate: null,
      samples,
      channels,
      pcm: false,
      lineEndsIgnored: false,
    });
    expect(recording.format).toContain(`NPY, ${names[type[1]]}${8 * Number(type[2])}, `);
    for (const [from, to] of [
      [0, samples],
      [1, samples],
      [samples >> 1, samples - 1],
    ]) {
      const planes = await recording.read([...channels.keys()], from, to);
      const wrong = planes.findIndex(
        (plane, c) =>
          plane.length !== to - from || plane.some((value, i) => value !== wanted[n][c][from + i]),
      );
      expect(wrong).toBe(-1);
    }
  });

  it('that is cut keeps its whole frames', async () => {
    const n = cases.findIndex(({ type, shape }) => type === '<f8' && `${shape}` === '50,3');
    const bytes = bytesOf(n).slice(0, -25);
    const { recording, findings } = await openRecording(strictSource(bytes), 'a.npy', newPace());
    expect(findings).toMatchObject([{ code: 'truncated', values: { declared: 1200, there: 1175 } }]);
    const planes = await recording?.read([0, 1, 2], 0, 48);
    expect(planes?.map((plane) => Array.from(plane))).toEqual(wanted[n].map((plane) => plane.slice(0, 48)));
    expect(recording?.samples).toBe(48);
  });

  it.each([
    ['[channel][sample]', '3,50', 'C'],
    ['by column', '50,3', 'F'],
  ])('that is cut and stored %s has lost a channel', async (_, shape, order) => {
    const n = cases.findIndex((c) => `${c.shape}` === shape && c.order === order);
    const { recording, findings } = await openRecording(
      strictSource(bytesOf(n).slice(0, -1)),
      'a.npy',
      newPace(),
    );
    expect(recording).toBeNull();
    expect(findings[0]).toMatchObject({ code: 'unreadable-header', severity: 'blocker' });
  });
});

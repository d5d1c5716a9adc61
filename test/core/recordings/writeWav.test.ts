import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { openWav } from '../../../core/recordings/wav/openWav';
import { floatWavHeader, floatWavSamples } from '../../../core/recordings/writeWav';
import { needs, python } from '../../support/programs';
import { normals } from '../../support/random';
import { joined, strictSource } from '../../support/wavBytes';

const folder = mkdtempSync(join(tmpdir(), 'written-'));
afterAll(() => rmSync(folder, { recursive: true }));
const file = join(folder, 'test.wav');
const run = (command: string, args: string[]) =>
  execFileSync(command, args, { maxBuffer: 1 << 24, stdio: ['ignore', 'pipe', 'ignore'] });

function written(planes: Float64Array[], sampleRate = 48000): Uint8Array {
  const header = floatWavHeader(sampleRate, planes.length, planes[0].length);
  const bytes = joined(header, floatWavSamples(planes));
  writeFileSync(file, bytes);
  return bytes;
}

const planesOf = (channels: number) => Array.from({ length: channels }, (_, c) => normals(c + 1, 1001));
const rounded = (planes: Float64Array[]) => planes.map((plane) => plane.map(Math.fround));

describe('a written file', () => {
  it.each([1, 2, 5])('of %i channels is read back', async (channels) => {
    const planes = planesOf(channels);
    const { recording, findings } = await openWav(strictSource(written(planes)), 'test.wav');
    expect(findings).toEqual([]);
    expect(recording).toMatchObject({ format: 'WAV, float 32 bit', sampleRate: 48000, samples: 1001 });
    expect(await recording?.read([...planes.keys()], 0, 1001)).toEqual(rounded(planes));
  });

  it('keeps values beyond full scale and those that are no numbers', async () => {
    const plane = Float64Array.of(1e30, -7.25, Number.NaN, Number.NEGATIVE_INFINITY, 1e300, 1e-300);
    const { recording } = await openWav(strictSource(written([plane])), 'test.wav');
    const wanted = [
      Math.fround(1e30),
      -7.25,
      Number.NaN,
      Number.NEGATIVE_INFINITY,
      Number.POSITIVE_INFINITY,
      0,
    ];
    expect(await recording?.read([0], 0, 6)).toEqual([Float64Array.from(wanted)]);
  });

  it('has whole numbers for its rate', async () => {
    const { recording } = await openWav(strictSource(written([normals(1, 9)], 44099.6)), 'test.wav');
    expect(recording?.sampleRate).toBe(44100);
  });

  it('of a slow recording has the lowest rate there is', async () => {
    const { recording, findings } = await openWav(strictSource(written([normals(1, 9)], 0.1)), 'test.wav');
    expect(findings).toEqual([]);
    expect(recording).toMatchObject({ sampleRate: 1, samples: 9 });
  });

  it.skipIf(!needs('scipy'))('is read by SciPy, without a warning', () => {
    const planes = planesOf(3);
    written(planes);
    const script = `
import sys
from scipy.io import wavfile
rate, data = wavfile.read(sys.argv[1])
assert (rate, str(data.dtype), data.shape) == (48000, 'float32', (1001, 3)), (rate, data.dtype, data.shape)
sys.stdout.buffer.write(data.T.astype('<f8').tobytes())`;
    const all = new Float64Array(new Uint8Array(run(python, ['-W', 'error', '-c', script, file])).buffer);
    expect([0, 1, 2].map((c) => all.slice(1001 * c, 1001 * (c + 1)))).toEqual(rounded(planes));
  });

  it.skipIf(!needs('sox'))('is read by sox', () => {
    // sox has 32-bit integers inside: multiples of 2^-20 pass through them unchanged.
    const planes = planesOf(2).map((plane) => plane.map((v) => Math.round((v / 8) * 2 ** 20) / 2 ** 20));
    written(planes);
    const about = ['-s', '-c', '-r', '-b', '-e'].map((asked) => run('soxi', [asked, file]).toString().trim());
    expect(about).toEqual(['1001', '2', '48000', '32', 'Floating Point PCM']);
    const all = new Float64Array(new Uint8Array(run('sox', ['-D', file, '-t', 'f64', '-L', '-'])).buffer);
    expect([0, 1].map((c) => all.filter((_, i) => i % 2 === c))).toEqual(planes);
  });
});

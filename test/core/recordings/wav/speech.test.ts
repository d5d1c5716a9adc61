import { execFileSync } from 'node:child_process';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { newPace } from '../../../../core/pace';
import { openRecording } from '../../../../core/recordings/openRecording';
import { needs, python } from '../../../support/programs';
import { strictSource } from '../../../support/wavBytes';

// Spoken words of Debian's package alsa-utils, read by scipy.io.wavfile.

const folder = '/usr/share/sounds/alsa';
const there = needs('alsa') && needs('scipy');
const files = there ? readdirSync(folder).filter((name) => name.endsWith('.wav')) : [];
// The type is printed first, then the samples follow as doubles.
const script = `
import sys
from scipy.io import wavfile
rate, data = wavfile.read(sys.argv[1])
head = f'{data.dtype} {rate} {data.ndim} '.ljust(64)
sys.stdout.buffer.write(head.encode() + data.astype('<f8').tobytes())`;

describe.skipIf(!there)('speech', () => {
  it('is there', () => {
    expect(files.length).toBeGreaterThan(1);
  });

  it.each(files)('%s', async (name) => {
    const path = join(folder, name);
    const bytes = new Uint8Array(
      execFileSync(python, ['-W', 'ignore', '-c', script, path], { maxBuffer: 1 << 26 }),
    );
    const [type, rate, axes] = Buffer.from(bytes).toString('latin1', 0, 64).split(' ');
    expect([type, axes]).toEqual(['int16', '1']);
    const wanted = new Float64Array(bytes.slice(64).buffer);
    const source = strictSource(new Uint8Array(readFileSync(path)));
    const { recording, findings } = await openRecording(source, name, newPace());
    expect(findings).toEqual([]);
    expect(recording).toMatchObject({
      format: 'WAV, PCM 16 bit',
      pcm: true,
      sampleRate: Number(rate),
      samples: wanted.length,
    });
    const [plane] = (await recording?.read([0], 0, wanted.length)) ?? [new Float64Array(0)];
    expect(plane.findIndex((value, n) => value !== wanted[n] / 32768)).toBe(-1);
    expect(plane.length).toBe(wanted.length);
  });
});

import { spawnSync } from 'node:child_process';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { memorySource } from '../../../../core/bytes/byteSource';
import { openWav } from '../../../../core/recordings/wav/openWav';
import { surveyRecording } from '../../../../core/suitability/recording/surveyRecording';
import { wavBytes } from '../../../bench/fileBytes';
import { emptyFolder } from '../../../support/cli';
import { needs } from '../../../support/programs';
import { normals, seededUniform } from '../../../support/random';
import { pace } from '../../../support/takes';
import { limited, only, pcm, quantised, resonant, scaled, signal, sluggish, sum, survey } from './signals';

// Truth: the limiter of the generator, whose samples can be counted.

const N = 30_000;
const seeds = 20;
const tau = 2 * Math.PI;
const random = (seed: number, from: number, to: number) => from + (to - from) * seededUniform(seed)();
const sine = (seed: number, from: number, to: number) => {
  const turn = tau * random(seed + 30, from, to);
  return signal(N, (n) => Math.sin(turn * n + seed));
};
const count = (x: Float64Array, is: (value: number) => boolean) =>
  x.reduce((all, v) => all + (is(v) ? 1 : 0), 0);

type Traits = { pcm?: boolean; bits?: number };
const pcm16: Traits = { pcm: true, bits: 16 };
const pcm24: Traits = { pcm: true, bits: 24 };

/** Each with the part of its amplitude, or of its rms, from which it is cut. */
const clipped: [string, (seed: number) => Float64Array, Traits?][] = [
  ['a sine at half its amplitude', (s) => limited(sine(s, 0.001, 0.05), 0.5)],
  [
    'a sine of whole periods at half its amplitude',
    (s) =>
      limited(
        signal(N, (n) => Math.sin((tau * (n % (100 + 7 * s))) / (100 + 7 * s) + 0.1)),
        0.5,
      ),
  ],
  ['a sine at nine tenths', (s) => limited(sine(s, 0.002, 0.02), 0.9)],
  ['a sine with a little noise', (s) => limited(sum(sine(s, 0.001, 0.05), scaled(normals(s, N), 0.01)), 0.7)],
  ['a sine in hundredths', (s) => quantised(limited(scaled(sine(s, 0.01, 0.05), 5), 3), 0.01)],
  ['a sine of 12 bit, 6 dB over', (s) => limited(quantised(scaled(sine(s, 0.001, 0.05), 4096), 1), 2047)],
  ['a sine of PCM 16 bit, 1 dB over', (s) => pcm(scaled(sine(s, 0.001, 0.02), 1.12)), pcm16],
  ['a sine of PCM 16 bit, 20 dB over', (s) => pcm(scaled(sine(s, 0.001, 0.02), 10)), pcm16],
  ['a sine of PCM 24 bit, 3 dB over', (s) => pcm(scaled(sine(s, 0.001, 0.02), 1.4), 24), pcm24],
  ['white noise at 2.5 times its rms', (s) => limited(normals(s, N), 2.5)],
  ['white noise at its rms', (s) => limited(normals(s, N), 1)],
  ['white noise of PCM 16 bit at 2.5 times its rms', (s) => pcm(scaled(normals(s, N), 0.4)), pcm16],
  [
    'coloured noise of PCM 16 bit at twice its rms',
    (s) => pcm(scaled(resonant(s, N, 0.98, 0.2), 0.5)),
    pcm16,
  ],
  ['coloured noise at twice its rms', (s) => limited(resonant(s, N, 0.95, 0.5), 2)],
  [
    'a random walk of whole numbers at its rms',
    (s) => limited(quantised(scaled(sluggish(s, N, 0.99), 300), 1), 300),
  ],
];

describe('clipped finds', () => {
  it.each(clipped)('%s', async (_, make, traits = {}) => {
    for (let seed = 1; seed <= seeds; seed++) {
      const x = make(seed);
      const top = x.reduce((a, b) => Math.max(a, b));
      const bottom = x.reduce((a, b) => Math.min(a, b));
      const atLimit = (value: number) => value === top || value === bottom;
      const findings = await survey([x], null, traits);
      const found = only(findings, 'clipped');
      expect(found.severity).toBe('caution');
      expect(found.values.samples, `seed ${seed}`).toBe(count(x, atLimit));
      expect(found.from).toBe(x.findIndex(atLimit));
      let runs = 0;
      x.forEach((value, n) => {
        if (atLimit(value) && value !== x[n - 1]) runs++;
      });
      expect(found.values.runs).toBe(runs);
      expect(findings.filter(({ code }) => code === 'stuck')).toEqual([]);
    }
  });
});

describe('clipped', () => {
  it('counts what sox says it clipped', { skip: !needs('sox') }, async () => {
    for (let seed = 1; seed <= 5; seed++) {
      const folder = emptyFolder();
      const quiet = join(folder, 'quiet.wav');
      const loud = join(folder, 'loud.wav');
      writeFileSync(
        quiet,
        wavBytes([pcm(scaled(resonant(seed, N, 0.97, 0.15), 0.25)).map((v) => 32768 * v)], 8000),
      );
      const said = spawnSync('sox', ['-D', quiet, loud, 'vol', '2'], { encoding: 'utf8' }).stderr;
      const lost = Number(/clipped (\d+) samples/.exec(said)?.[1]);
      expect(lost).toBeGreaterThan(500);
      const { recording } = await openWav(memorySource(readFileSync(loud)), 'loud.wav');
      if (recording === null) throw new Error('sox wrote no WAV file');
      const found = only((await surveyRecording(recording, {}, pace)).findings, 'clipped');
      // A sample may be at the limit without having been cut.
      expect(found.values.samples).toBeGreaterThanOrEqual(lost);
      expect(found.values.samples).toBeLessThanOrEqual(lost + 5);
    }
  });

  it('finds one side alone, and says where', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const x = sine(seed, 0.003, 0.02).map((value) => Math.min(value, 0.6));
      const found = only(await survey([x]), 'clipped');
      expect(found.values.level).toBe('0.6');
      expect(found.values.samples).toBe(count(x, (value) => value === 0.6));
      const starts = Array.from(x.keys()).filter((n) => x[n] === 0.6 && x[n - 1] !== 0.6);
      expect(found.values.positions).toBe(`samples ${starts.slice(0, 5).join(', ')}, …`);
    }
  });

  it('finds a single run at full scale', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const x = resonant(seed, N, 0.98, 0.1).map((value) => 0.15 * value);
      const at = 1000 + 1000 * seed;
      for (let n = 0; n < 40; n++) x[at + n] += Math.sin((Math.PI * n) / 40) * 2;
      const cut = pcm(x);
      const found = only(await survey([cut], null, pcm16), 'clipped');
      expect(found.values.samples).toBe(count(cut, (value) => value === 32767 / 32768));
    }
  });
});

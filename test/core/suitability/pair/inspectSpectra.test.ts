import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { say } from '../../../../core/findings/say';
import { newPace } from '../../../../core/pace';
import { measureMoments } from '../../../../core/pair/moments';
import { readPairing } from '../../../../core/pipeline/pairing';
import { effectiveAverages } from '../../../../core/spectra/crossSpectra';
import { inspectSpectra } from '../../../../core/suitability/pair/inspectSpectra';
import { newNodeHost } from '../../../../extension/node/nodeHost';
import { normals } from '../../../support/random';
import { convolve, takeOf } from '../../../support/takes';
import { codes, coloured, inspect } from './paths';

const bench = join(__dirname, '../../../../media/bench');

async function inspectBench(file: string) {
  const host = newNodeHost(bench, newPace());
  try {
    const place = { file, folder: '' };
    const { pairing } = await readPairing(host, readFileSync(join(bench, file), 'utf8'), place);
    const { document, takes, sampleRate } = pairing!;
    const { means } = await measureMoments(takes, document.prepare.removeMean, host.pace);
    const lags = takes.map(() => 0);
    const { job, filter } = document;
    return await inspectSpectra({ takes, job, filter, sampleRate, means, lags }, host.pace);
  } finally {
    await host.close();
  }
}

const ideal: Record<string, { idealNmseDb: number }> = JSON.parse(
  readFileSync(join(bench, 'ideal.json'), 'utf8'),
);

describe('the sample pairings', () => {
  // What no filter of any length can pass must be no less than what one of the document's length reaches, and not
  // far above it, since those lengths were chosen to be enough. Other samples: one decibel of grace.
  it.each(['belt.pairing.json', 'valve.pairing.json', 'tubing.pairing.json'])(
    '%s: the attainable reduction agrees with the known ideal',
    async (file) => {
      const { together } = await inspectBench(file);
      expect(together.attainableDb).toBeGreaterThan(-ideal[file].idealNmseDb - 1);
      expect(together.attainableDb).toBeLessThan(-ideal[file].idealNmseDb + 1);
    },
  );

  it('have no findings but that of the tubing, whose upper band no filter brings back', async () => {
    expect(codes(await inspectBench('belt.pairing.json'))).toEqual([]);
    const valve = await inspectBench('valve.pairing.json');
    expect(codes(valve)).toEqual([]);
    // A 12 Hz valve below a flow meter's noise: nothing is known of it in the upper half of the spectrum.
    expect(valve.unknownBands.some(({ from, to }) => from < 250 && to > 400)).toBe(true);
    const tubing = await inspectBench('tubing.pairing.json');
    expect(codes(tubing)).toEqual(['spectral-null']);
    // "What has sunk into the transducer's noise, from about 2.2 kHz up, no filter brings back."
    for (const { from } of tubing.nulls!.bands) expect(from).toBeGreaterThan(2200);
  });
});

describe('inspectSpectra', () => {
  const samples = 30_000;
  const x = coloured(1, samples, 0.6);
  const noise = normals(2, samples);
  const clean = takeOf(
    [x],
    convolve(x, [0.5, 0.3, 0.1]).map((value, n) => value + 0.05 * noise[n]),
  );

  it('finds nothing against a clean pair, whatever the job', async () => {
    for (const job of ['cancel', 'identify', 'equalise'] as const) {
      expect(codes(await inspect({ takes: [clean], job }))).toEqual([]);
    }
  });

  it('gives coherence and its point by the averages it names', async () => {
    const { takes, together } = await inspect({ takes: [clean], job: 'cancel' });
    const { frequencies, values, significance, averages, effective, segment } = takes[0].coherence!;
    expect(frequencies.length).toBe(segment / 2 + 1);
    expect(frequencies[frequencies.length - 1]).toBe(500);
    expect(values.every((value) => value >= 0 && value <= 1)).toBe(true);
    expect(effective).toBe(effectiveAverages(takes[0].spectra));
    expect(effective / averages).toBeCloseTo(1 / (1 + 1 / 18), 2);
    expect(significance).toBeCloseTo(1 - 0.05 ** (1 / (effective - 1)), 10);
    expect(together.attainableDb).toBe(takes[0].attainableDb);
  });

  it('says low-coherence where half the power is unrelated, and not at 10 dB', async () => {
    const disturbanceOnly = [{ from: 0, to: samples }];
    const pairOf = (size: number) => {
      const d = x.map((value, n) => value + size * noise[n]);
      return takeOf([x], d, { disturbanceOnly });
    };
    const { findings, together } = await inspect({ takes: [pairOf(1.25)], job: 'cancel' });
    // Powers 1.5625 and 1.5625.
    expect(Math.abs(together.attainableDb! - 3.01)).toBeLessThan(0.3);
    expect(findings.map(({ code, severity }) => [code, severity])).toEqual([['low-coherence', 'caution']]);
    expect(say(findings[0])).toMatch(/more than (2\.9|3(\.\d)?) dB when expected at least 6 dB/);
    expect(codes(await inspect({ takes: [pairOf(0.39)], job: 'cancel' }))).toEqual([]);
  });

  it('says so of the take that has it', async () => {
    const bad = { ...takeOf([x], noise), name: 'unplugged' };
    const { findings } = await inspect({ takes: [clean, bad], job: 'identify' });
    const low = findings.filter(({ code }) => code === 'low-coherence');
    expect(low.map(({ take }) => take)).toEqual(['unplugged']);
  });

  it('measures a canceller where the disturbance is alone, and only notes it where it never is', async () => {
    const wanted = normals(3, samples).map((value, n) => (n < samples / 2 ? 0 : 3 * value));
    const d = clean.desired;
    const [own] = await d.recording.read([d.channel], 0, samples);
    const mixed = takeOf(
      [x],
      own.map((value, n) => value + wanted[n]),
    );
    const without = await inspect({ takes: [mixed], job: 'cancel' });
    expect(without.findings.map(({ code, severity }) => [code, severity])).toEqual([
      ['low-coherence', 'note'],
    ]);
    expect(say(without.findings[0])).toContain('the wanted signal counts among it');
    const alone = { ...mixed, disturbanceOnly: [{ from: 0, to: samples / 2 }] };
    const { together, findings } = await inspect({ takes: [alone], job: 'cancel' });
    expect(findings).toEqual([]);
    // 0.05² below the power of the convolved input.
    expect(together.attainableDb).toBeGreaterThan(20);
  });

  it('leaves out gaps: no segment runs across one', async () => {
    const burst = x.map((value, n) => (n >= 10_000 && n < 11_000 ? 1000 * noise[n] : value));
    const [own] = await clean.desired.recording.read([clean.desired.channel], 0, samples);
    const fit = [
      { from: 0, to: 9900 },
      { from: 11_100, to: samples },
    ];
    const gap = await inspect({ takes: [takeOf([burst], own, { fit })], job: 'cancel' });
    expect(gap.together.attainableDb).toBeGreaterThan(20);
    expect(gap.findings).toEqual([]);
  });

  it('has sentences whose every value is filled in', async () => {
    const short = takeOf([x.slice(0, 400)], noise.slice(0, 400));
    const inspected = await inspect({ takes: [short], job: 'identify' });
    expect(codes(inspected)).toEqual(['attainable-unknown']);
    expect(say(inspected.findings[0])).not.toMatch(/[{}]/);
  });
});

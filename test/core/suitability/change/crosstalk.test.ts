import { describe, expect, it } from 'vitest';
import { finding } from '../../../../core/findings/finding';
import { say } from '../../../../core/findings/say';
import { inspectChange } from '../../../../core/suitability/change/inspectChange';
import { normals, seededUniform } from '../../../support/random';
import { convolve, pace, takeOf } from '../../../support/takes';
import { documentOf, noMeans, resonance, withNoise } from '../signals';

const count = 24000;
const third = count / 3;
const path = Array.from({ length: 16 }, (_, k) => 0.7 * Math.cos(k) * Math.exp(-k / 5));

/** Wanted signals, present in the middle third alone. */
const wantedKinds: Record<string, (seed: number) => Float64Array> = {
  noise: (seed) => normals(seed, count).map((v) => 2 * v),
  'low frequencies': (seed) => resonance(normals(seed, count), 0.004, 0.7).map((v) => 20 * v),
  pulses: (seed) => {
    const uniform = seededUniform(seed);
    const starts = Array.from({ length: 9 }, (_, i) => third + 880 * i + 60 * uniform());
    return Float64Array.from({ length: count }, (_, n) =>
      starts.reduce(
        (sum, at) => sum + (n > at && n < at + 500 ? 5 * (1 - ((n - at - 250) / 250) ** 2) : 0),
        0,
      ),
    );
  },
  'a tone': (seed) => normals(seed, count).map((_, n) => 3 * Math.sin(0.31 * n + seed)),
};

interface Scene {
  kind: string;
  seed: number;
  /** What of the wanted signal the reference picks up. */
  leak: number;
  /** Level of the disturbance while the wanted signal is present. */
  level?: number;
}

/** Reference and cell of a canceller with the wanted signal in the middle third. */
function sceneOf({ kind, seed, leak, level = 1 }: Scene) {
  const present = (n: number) => n >= third && n < 2 * third;
  const wanted = wantedKinds[kind](seed + 100).map((v, n) => (present(n) ? v : 0));
  const disturbance = normals(seed, count).map(
    (v, n) => (present(n) ? level : 1) * (v + 0.5 * Math.sin(0.02 * n) + 0.5 * Math.sin(0.3 * n)),
  );
  const reference = withNoise(
    disturbance.map((v, n) => v + leak * wanted[n]),
    0.02,
    seed + 200,
  );
  const cell = withNoise(
    convolve(disturbance, path).map((v, n) => v + wanted[n]),
    0.05,
    seed + 300,
  );
  return { reference, cell };
}

async function inspected(
  scene: Scene,
  disturbanceOnly = [
    { from: 0, to: third },
    { from: 2 * third, to: count },
  ],
) {
  const { reference, cell } = sceneOf(scene);
  // The fit takes in the wanted signal, as a careless document does.
  const fit = [{ from: 0, to: 1.5 * third }];
  const take = takeOf([reference], cell, {
    fit,
    heldOut: [{ from: 1.5 * third, to: count }],
    disturbanceOnly,
  });
  return inspectChange([take], documentOf('cancel', 32), noMeans(), pace);
}

describe.each(Object.keys(wantedKinds))('the wanted signal: %s', (kind) => {
  it('is not found in a reference that is free of it', async () => {
    for (let seed = 0; seed < 25; seed++) {
      const { findings, crosstalk } = await inspected({ kind, seed, leak: 0 });
      expect(crosstalk).not.toBeNull();
      expect(findings.map(say), `seed ${seed}`).toEqual([]);
    }
  });

  it('is found in a reference that picks up a third of it', async () => {
    for (let seed = 0; seed < 10; seed++) {
      const { findings, crosstalk } = await inspected({ kind, seed, leak: 0.33 });
      expect(findings.map(({ code }) => code)).toContain('crosstalk');
      expect(crosstalk!.comparison.gainDb).toBeGreaterThan(0.5);
      expect(crosstalk!.coherence).toBeGreaterThan(0.1);
    }
  });
});

it('measures the coherence that the wanted signal adds', async () => {
  for (let seed = 0; seed < 10; seed++) {
    const { crosstalk } = await inspected({ kind: 'noise', seed, leak: 0.5 });
    // Reference n + s/2 with s = 2 times white, cell h*n + s; the tones fall out. With what the path's own filter
    // leaves, e = s - (h*s)/2: share of its power that white n + s/2 explains, from their spectra.
    let [explained, all] = [0, 0];
    for (let i = 0; i < 512; i++) {
      const angle = (Math.PI * (i + 0.5)) / 512;
      const re = 1 - path.reduce((sum, v, k) => sum + v * Math.cos(angle * k), 0) / 2;
      const im = path.reduce((sum, v, k) => sum + v * Math.sin(angle * k), 0) / 2;
      const power = 4 * (re * re + im * im);
      all += power;
      // Cross-spectrum with the reference: half of s; the reference's power: 1 of n and 1 of s.
      explained += power * (1 / 2);
    }
    expect(Math.abs(crosstalk!.coherence - explained / all)).toBeLessThan(0.05);
  }
});

it.each([0.1, 10])('is not taken in by a disturbance of %f times the level', async (level) => {
  for (let seed = 0; seed < 15; seed++) {
    for (const kind of Object.keys(wantedKinds)) {
      const { findings } = await inspected({ kind, seed, leak: 0, level });
      expect(findings.map(({ code }) => code)).not.toContain('crosstalk');
    }
  }
});

describe('where it cannot be told', () => {
  it('a note says how to record it, unless the design asked for the same', async () => {
    const { crosstalk, findings } = await inspected({ kind: 'noise', seed: 1, leak: 0 }, []);
    expect(crosstalk).toBeNull();
    expect(findings.map(({ code, severity }) => [code, severity])).toContainEqual([
      'crosstalk-unknown',
      'note',
    ]);
    const { reference, cell } = sceneOf({ kind: 'noise', seed: 1, leak: 0 });
    const take = takeOf([reference], cell);
    const asked = [finding('no-disturbance-only', {}, { path: ['takes', 0] })];
    const again = await inspectChange([take], documentOf('cancel', 32), noMeans(), pace, asked);
    expect(again.findings.map(({ code }) => code)).not.toContain('crosstalk-unknown');
  });

  it.each(['identify', 'equalise', 'predict'] as const)('nothing is said for %s', async (job) => {
    const { reference, cell } = sceneOf({ kind: 'a tone', seed: 1, leak: 0.33 });
    const { crosstalk, findings } = await inspectChange(
      [takeOf([reference], cell)],
      documentOf(job, 32),
      noMeans(),
      pace,
    );
    expect(crosstalk).toBeNull();
    expect(findings.filter(({ code }) => code.startsWith('crosstalk'))).toEqual([]);
  });
});

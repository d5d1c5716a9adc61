import { describe, expect, it } from 'vitest';
import { designFiles } from '../../../core/files/designFiles';
import { say } from '../../../core/findings/say';
import { type BandFilter, bandFilter } from '../../../core/pair/bandFilter';
import { check } from '../../../core/pipeline/check';
import { design } from '../../../core/pipeline/design';
import type { DesignResult } from '../../../core/pipeline/designResult';
import { csvOf, memoryHost } from '../../support/memoryHost';
import { nodeSha256 } from '../../support/nodeSha256';
import { normals } from '../../support/random';
import { convolve } from '../../support/takes';

// The whole job with the error weighted to a band: a path of 40 taps, met by 10, and a loud disturbance outside the band
// that follows the input, so that an unweighted fit spends its taps on it.

const rate = 1000;
const samples = 12000;
const heldOutFrom = 8000;
const asked = { from: 50, to: 150 };
const band = bandFilter(asked, rate) as BandFilter;

const x = normals(1, samples);
const low = convolve(
  x,
  Array.from({ length: 40 }, (_, k) => 0.9 ** k * Math.cos(0.6 * k)),
);
const high = convolve(
  x,
  Array.from({ length: 40 }, (_, k) => 3 * 0.93 ** k * Math.cos(2.4 * k)),
);
const noise = normals(2, samples);
const d = low.map((v, n) => v + high[n] + 0.05 * noise[n]);
const files = { 'r.csv': csvOf({ x, d }) };
const place = { file: 'r.pairing.json', folder: '' };

function text(prepare: object): string {
  return JSON.stringify({
    pairing: 1,
    title: 'Band',
    job: 'identify',
    sampleRate: rate,
    takes: [
      {
        name: 'one',
        inputs: [{ file: 'r.csv', channel: 'x' }],
        desired: { file: 'r.csv', channel: 'd' },
        fit: { from: 0, to: heldOutFrom, samples: true },
        heldOut: { from: heldOutFrom, to: samples, samples: true },
      },
    ],
    prepare: { removeMean: false, ...prepare },
    filter: { length: 10, delay: 0, regularisation: 0 },
    arithmetic: { input: { fullScale: 8 }, output: { fullScale: 64 } },
    write: { folder: '.', symbol: 'r', testVectors: 16 },
  });
}

async function designed(prepare: object): Promise<DesignResult> {
  const { result, findings } = await design(memoryHost(files), text(prepare), place);
  if (result === null) throw new Error(findings.map(({ code }) => code).join());
  return result;
}

/** Held-out NMSE of taps inside and outside the band, by filtering the error explicitly. */
function nmseOf(coefficients: Float64Array): { inside: number; outside: number } {
  const y = convolve(x, coefficients);
  const e = d.map((v, n) => v - y[n]);
  const late = (row: Float64Array, n: number) => row[n - band.history / 2];
  const [bandE, bandD] = [convolve(e, band.taps), convolve(d, band.taps)];
  const sums = { e: 0, d: 0, eOut: 0, dOut: 0 };
  for (let n = heldOutFrom; n < samples; n++) {
    sums.e += bandE[n] ** 2;
    sums.d += bandD[n] ** 2;
    sums.eOut += (late(e, n) - bandE[n]) ** 2;
    sums.dOut += (late(d, n) - bandD[n]) ** 2;
  }
  return { inside: 10 * Math.log10(sums.e / sums.d), outside: 10 * Math.log10(sums.eOut / sums.dOut) };
}

describe('a design weighted to a band', () => {
  it('has a smaller error in the band than the unweighted one, and shows the error outside beside it', async () => {
    const plain = await designed({});
    const weighted = await designed({ band: asked });
    const { inside, outside } = nmseOf(weighted.coefficients[0]);
    expect(weighted.heldOut?.nmseDb).toBeCloseTo(inside, 6);
    expect(weighted.heldOut?.outsideBandDb).toBeCloseTo(outside, 6);
    expect(weighted.heldOut?.samples).toBe(samples - heldOutFrom);
    expect(inside).toBeLessThan(nmseOf(plain.coefficients[0]).inside - 3);
    expect(outside).toBeGreaterThan(nmseOf(plain.coefficients[0]).outside);
    expect(plain.heldOut?.outsideBandDb).toBeNull();
    // The written integers are judged in the band too: 16 bits lose nothing there.
    expect(Math.abs(weighted.arithmetic.quantisationLossDb ?? 99)).toBeLessThan(0.01);
    expect(weighted.words?.words.find(({ word }) => word === 16)?.nmseDb).toBeCloseTo(inside, 1);
    // The fit is seen through the same band.
    expect(Math.abs(weighted.fit.nmseDb - inside)).toBeLessThan(1);
  });

  it('writes the error outside into the taps file and the note, and checks as current', async () => {
    const document = text({ band: asked });
    const result = await designed({ band: asked });
    const written = designFiles(result, nodeSha256);
    const contents = Object.fromEntries(written.map(({ path, bytes }) => [path, bytes]));
    const textOf = (path: string) => new TextDecoder().decode(contents[path]);
    const outside = Number(result.heldOut?.outsideBandDb?.toFixed(2));
    expect(JSON.parse(textOf('r.taps.json'))).toMatchObject({
      prepare: { band: asked },
      heldOut: { outsideBandDb: outside },
    });
    expect(textOf('r.note.md')).toContain(
      `| held out, outside the band | 4,000 | – | ${outside.toFixed(2)} dB | – |`,
    );
    expect(textOf('r.note.md')).toContain('the power of the error in the band 50 Hz to 150 Hz is');
    const checked = await check(memoryHost({ ...files, ...contents }), document, place);
    expect(checked.state).toBe('current');
  });

  it('sees that the band needs history: what lies before the first interval or in a gap is not made up', async () => {
    const gap = { from: 3000, to: 4000 };
    const document = JSON.parse(text({ band: asked }));
    document.takes[0].fit = [
      { from: 0, to: gap.from, samples: true },
      { from: gap.to, to: heldOutFrom, samples: true },
    ];
    const broken = d.slice();
    broken.fill(Number.NaN, gap.from + 1, gap.to);
    const host = memoryHost({ 'r.csv': csvOf({ x, d: broken }).replace(/NaN/g, 'nan') });
    const { result, findings } = await design(host, JSON.stringify(document), place);
    expect(findings.filter(({ severity }) => severity === 'blocker')).toEqual([]);
    const lost = 2 * (band.history + 9);
    expect(result?.fit.samples).toBe(heldOutFrom - (gap.to - gap.from) - lost);
    expect(result?.confidence.residuals.samples).toBe(result?.fit.samples);
  });

  it.each([
    [{ from: 100, to: 501 }, 'band-beyond-rate', 'ends at 501 Hz when expected at most 500 Hz'],
    [{ from: 100, to: 100.5 }, 'band-too-narrow', 'its width asks for them'],
    [{ from: 0.1, to: 100 }, 'band-too-narrow', 'its lower edge, so close to 0 Hz, asks for them'],
  ])('refuses %j: %s', async (wrong, code, words) => {
    const { result, findings } = await design(memoryHost(files), text({ band: wrong }), place);
    expect(result).toBeNull();
    expect(findings).toMatchObject([{ code, severity: 'blocker', path: ['prepare', 'band'] }]);
    expect(say(findings[0])).toContain(words);
  });

  it('takes all frequencies as no band at all', async () => {
    const plain = await designed({});
    const whole = await designed({ band: { from: 0, to: 500 } });
    // But for the floor of 1e-4, 80 dB below.
    expect(whole.heldOut?.nmseDb).toBeCloseTo(plain.heldOut?.nmseDb ?? 0, 3);
  });
});

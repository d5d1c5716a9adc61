import { describe, expect, it } from 'vitest';
import { say, sayWithPlace } from '../../../../core/findings/say';
import { inspectTiming } from '../../../../core/suitability/timing/inspectTiming';
import { normals } from '../../../support/random';
import { pace, takeOf } from '../../../support/takes';
import { benchDocuments, benchPair } from '../benchPairs';
import { documentOf, later, noMeans, resonance, separateFiles, sound, withNoise } from '../signals';

describe('the sample bench', () => {
  it.each(benchDocuments)('%s has no finding', async (name) => {
    const { document, takes, means } = await benchPair(name);
    const { takes: figures, findings } = await inspectTiming(takes, document, means, pace);
    expect(findings.map(say)).toEqual([]);
    expect(figures.map((take) => take.name)).toEqual(takes.map((take) => take.name));
    // One recorder took each take.
    for (const take of figures) expect([take.driftPpm, take.driftPpmStandardError]).toEqual([null, null]);
  });

  it('has the lag of its tubing, whose flush transducer is first, and the belt’s two samples', async () => {
    const tubing = await benchPair('tubing.pairing.json');
    const [{ lagSamples }] = (await inspectTiming(tubing.takes, tubing.document, tubing.means, pace)).takes;
    // README of the bench: 214 mm of tubing at 8000 samples a second; at 343 m/s and with the cavity behind it.
    expect(lagSamples!).toBeLessThan((-0.214 / 343) * 8000);
    expect(lagSamples!).toBeGreaterThan((-0.214 / 343) * 8000 - 2);
    const belt = await benchPair('belt.pairing.json');
    for (const take of (await inspectTiming(belt.takes, belt.document, belt.means, pace)).takes) {
      expect(Math.abs(take.lagSamples! - 2)).toBeLessThan(1);
    }
  });

  it.each([
    ['valve.pairing.json', -30, 'acausal'],
    ['belt.pairing.json', -10, 'acausal'],
    ['tubing.pairing.json', -8, 'acausal'],
  ])('%s with a delay of %i is told so', async (name, delay, code) => {
    const { document, takes, means } = await benchPair(name);
    const changed = { ...document, filter: { ...document.filter, delay } };
    const { findings } = await inspectTiming(takes, changed, means, pace);
    expect(findings.map((f) => f.code)).toEqual([code]);
    expect(findings[0].values.delay as number).toBeGreaterThan(delay);
    expect(say(findings[0])).not.toMatch(/\{|undefined|NaN/);
  });
});

describe('the lag', () => {
  const lagged = async (
    lag: number,
    length: number,
    delay: number,
    separate: boolean,
    job = 'identify' as const,
  ) => {
    const x = sound(3, 20000);
    const d = withNoise(later(x, lag), 0.1, 4);
    const take = separate ? separateFiles([x], d) : takeOf([x], d);
    return (await inspectTiming([take], documentOf(job, length, delay), noMeans(), pace)).findings;
  };

  it('out of the filter’s reach is a caution with a delay that takes it up', async () => {
    for (const separate of [false, true]) {
      const [found, ...more] = await lagged(137.4, 64, 0, separate);
      expect(more).toEqual([]);
      expect([found.code, found.severity, found.values.offer]).toEqual(['lag', 'caution', -129]);
      expect(sayWithPlace(found)).toContain('comes 137.4 samples after');
      expect(await lagged(137.4, 64, -129, separate)).toEqual([]);
    }
    const [before] = await lagged(-300, 64, 0, false);
    expect([before.code, before.severity, before.values.offer]).toEqual(['lag', 'caution', 308]);
    expect(say(before)).toContain('comes 300.0 samples before');
    expect(await lagged(-300, 64, 308, false)).toEqual([]);
  });

  it('is a note where half the taps wait for it, or where the files were started separately', async () => {
    const severities = async (...args: Parameters<typeof lagged>) =>
      (await lagged(...args)).map(({ code, severity }) => `${code} ${severity}`);
    expect(await severities(37.4, 64, 0, false)).toEqual(['lag note']);
    expect(await severities(20, 64, 0, false)).toEqual([]);
    expect(await severities(20, 64, 0, true)).toEqual(['lag note']);
    expect(await severities(20, 64, -12, true)).toEqual([]);
    expect(await severities(-20, 64, 0, true)).toEqual(['lag caution']);
  });

  it('is none of an equaliser’s worries while it is in reach', async () => {
    const x = normals(5, 20000);
    const take = takeOf([withNoise(later(x, 3), 0.1, 6)], x);
    const { findings, takes } = await inspectTiming([take], documentOf('equalise', 64, 40), noMeans(), pace);
    expect(findings).toEqual([]);
    expect(Math.abs(takes[0].lagSamples! + 3)).toBeLessThan(0.1);
  });

  it('of several inputs is that of the clearest', async () => {
    const [x, other] = [normals(7, 20000), normals(8, 20000)];
    const [near, weak] = [later(x, 12), later(other, 40)];
    const d = withNoise(near, 0.1, 9).map((v, n) => v + 0.1 * weak[n]);
    const { takes } = await inspectTiming(
      [takeOf([other, x], d)],
      documentOf('cancel', 64),
      noMeans(2),
      pace,
    );
    expect(Math.abs(takes[0].lagSamples! - 12)).toBeLessThan(0.1);
  });

  it('of a prediction is not looked for', async () => {
    const x = resonance(normals(1, 8000), 0.05, 5);
    const { takes, findings } = await inspectTiming(
      [takeOf([x], x)],
      documentOf('predict', 32, -10),
      noMeans(),
      pace,
    );
    expect(findings).toEqual([]);
    expect(takes).toEqual([{ name: 'take', lagSamples: null, driftPpm: null, driftPpmStandardError: null }]);
  });
});

import { describe, expect, it } from 'vitest';
import { crossValidated } from '../../../core/choice/candidate';
import type { SearchResult } from '../../../core/choice/searchResult';
import { choiceJson } from '../../../core/files/choiceJson';
import { newPace, Stopped } from '../../../core/pace';
import { type Choice, choose } from '../../../core/pipeline/choose';
import { csvOf, memoryHost } from '../../support/memoryHost';
import { normals } from '../../support/random';
import { convolve } from '../../support/takes';

const samples = 3000;
const fit = 2000;
const x = normals(1, samples);
const path = normals(2, 12);
const noise = normals(3, samples);
const d = convolve(x, path).map((value, n) => value + 0.2 * noise[n]);

function documentOf(change: object = {}, take: object = {}): string {
  const track = (channel: string) => ({ file: 'a.csv', channel });
  return JSON.stringify({
    pairing: 1,
    title: 'Path',
    job: 'identify',
    sampleRate: 1000,
    takes: [
      {
        inputs: [track('x')],
        desired: track('d'),
        fit: { from: 0, to: fit, samples: true },
        heldOut: { from: fit, to: samples, samples: true },
        ...take,
      },
    ],
    filter: { length: 8, delay: 0, regularisation: 2e-6 },
    ...change,
  });
}

const place = { file: 'path.pairing.json', folder: '' };

async function chosenFrom(text: string, files: Record<string, string> = { 'a.csv': csvOf({ x, d }) }) {
  const { choice, findings } = await choose(memoryHost(files), text, place);
  if (choice === null) throw new Error(findings.map(({ code }) => code).join(' '));
  return { choice, codes: findings.map(({ code }) => code) };
}

const figures = ({ search, suggestion, reason }: Choice) => ({ search, suggestion, reason });

describe('choose', () => {
  it('finds the path, explains itself in two sentences and proves it on what was held out', async () => {
    const { choice, codes } = await chosenFrom(documentOf());
    expect(codes).toEqual([]);
    const { length, delay, regularisation, nmse } = choice.suggestion.chosen;
    expect(length).toBe(12);
    expect(delay).toBe(0);
    expect(choice.search.grid.regularisations).toContain(2e-6);
    expect(regularisation).toBeGreaterThan(2e-6);
    expect(choice.reason.match(/[.](?= |$)/g)?.length).toBe(2);
    expect(choice.reason).toContain('12 multiply-accumulates');
    // The noise is all that is left: known from how the signals were made.
    const power = path.reduce((sum, w) => sum + w * w, 0);
    const ideal = 10 * Math.log10(0.04 / (power + 0.04));
    expect(Math.abs(10 * Math.log10(nmse) - ideal)).toBeLessThan(0.3);
    expect(Math.abs((choice.heldOut?.nmseDb ?? 0) - ideal)).toBeLessThan(0.3);
    expect(choice.heldOut?.samples).toBe(samples - fit);
    expect(Math.abs((choice.attainableDb ?? 0) + ideal)).toBeLessThan(0.7);
  });

  it('looks at the held-out interval for the suggestion alone: other samples there change nothing else', async () => {
    const { choice } = await chosenFrom(documentOf());
    // A negative delay reads as many desired samples after the fit: those stay.
    const other = d.map((value, n) => (n < fit + 100 ? value : 10 * value + 3));
    const changed = await chosenFrom(documentOf(), { 'a.csv': csvOf({ x, d: other }) });
    expect(figures(changed.choice)).toEqual(figures(choice));
    expect(changed.choice.heldOut?.nmseDb).not.toBe(choice.heldOut?.nmseDb);
  });

  it('says so where nothing was held out, and where the candidates are not quite the document’s', async () => {
    const none = await chosenFrom(documentOf({}, { heldOut: [] }));
    expect(none.choice.heldOut).toBeNull();
    expect(none.codes).toEqual(['no-held-out']);
    const shaped = { filter: { length: 8, symmetry: 'even', windowing: 'autocorrelation' } };
    const { codes, choice } = await chosenFrom(documentOf(shaped));
    expect(codes).toEqual(['choice-of-free-taps']);
    expect(choice.reason).toContain('6 multiply-accumulates');
  });

  it('says so where the suggestion stands at the end of what was tried', async () => {
    const late = csvOf({ x, d: Float64Array.from(d, (_, n) => d[Math.max(0, n - 40)]) });
    const { codes, choice } = await chosenFrom(documentOf({ job: 'cancel' }), { 'a.csv': late });
    expect(codes).toContain('delay-at-the-end');
    expect(choice.suggestion.chosen.delay).toBe(-16);
  });

  it('keeps the horizon of a prediction', async () => {
    const sine = x.map((value, n) => 3 * Math.sin(0.3 * n) + value);
    const own = { inputs: [{ file: 'a.csv', channel: 'd' }] };
    const text = documentOf({ job: 'predict', filter: { length: 16, delay: -5 } }, own);
    const { choice } = await chosenFrom(text, { 'a.csv': csvOf({ x, d: sine }) });
    expect(choice.search.grid.delays).toHaveLength(33);
    expect(choice.search.grid.delays.at(-1)).toBe(-1);
    expect(choice.suggestion.chosen.delay).toBe(-5);
    expect(choice.opinions.map(({ delay }) => delay)).toEqual([-5, -5, -5]);
  });

  it('leaves out takes in turn, and takes the error of a canceller where the wanted signal is absent', async () => {
    const wanted = d.map((value, n) => value + (n % 1500 > 1000 ? 8 * Math.sin(0.4 * n) : 0));
    const part = (from: number) => ({
      name: `from ${from}`,
      inputs: [{ file: 'a.csv', channel: 'x' }],
      desired: { file: 'a.csv', channel: 'd' },
      fit: { from, to: from + 1500, samples: true },
      heldOut: [],
      disturbanceOnly: { from, to: from + 1000, samples: true },
    });
    const text = documentOf({ job: 'cancel', takes: [part(0), part(1500)] });
    const { choice } = await chosenFrom(text, { 'a.csv': csvOf({ x, d: wanted }) });
    expect(choice.folds.by).toBe('takes');
    // The longest is 32 taps: 31 samples of history in the first take; the largest delay is less.
    expect(choice.folds.samples).toBe(2000 - 31);
    const least = Math.min(...choice.suggestion.steps.map(({ nmse }) => nmse));
    // With the wanted signal in the error it would be above -2 dB.
    expect(10 * Math.log10(least)).toBeLessThan(-10);
  });

  it('weights the choice to a band', async () => {
    // A strong tone outside the band: it hides everything unless it is left out of account.
    const toned = d.map((value, n) => value + 30 * Math.sin(2.8 * n));
    const files = { 'a.csv': csvOf({ x, d: toned }) };
    const band = { prepare: { removeMean: true, band: { from: 50, to: 300 } } };
    const { choice } = await chosenFrom(documentOf(band), files);
    expect(choice.suggestion.chosen.length).toBeGreaterThanOrEqual(10);
    expect(choice.suggestion.chosen.nmse).toBeLessThan(0.02);
    expect(choice.heldOut?.nmseDb).toBeLessThan(-17);
    expect((await chosenFrom(documentOf(), files)).choice.suggestion.chosen.nmse).toBeGreaterThan(0.5);
  });

  it('refuses bad input with findings and stops where it is told to', async () => {
    const host = memoryHost({ 'a.csv': csvOf({ x, d }) });
    const codes = async (text: string) => {
      const { choice, findings } = await choose(host, text, place);
      expect(choice).toBeNull();
      return findings.map(({ code }) => code);
    };
    expect(await codes(documentOf({}, { fit: { from: 0, to: 60, samples: true } }))).toEqual([
      'too-short-to-choose',
    ]);
    expect(await codes(documentOf({ filter: { length: 0 } }))).toContain('out-of-range');
    expect(await codes(documentOf({}, { desired: { file: 'b.csv' } }))).toContain('missing-file');
    let told = false;
    const pace = newPace(
      () => told,
      (what) => {
        told = what === 'cross-validation';
      },
    );
    await expect(choose({ ...host, pace }, documentOf(), place)).rejects.toThrow(Stopped);
  });

  it('shows the curves of the document’s own regularisation first', async () => {
    const known: number[] = [];
    const count = (soFar: SearchResult) => {
      const { regularisations } = soFar.grid;
      const done = regularisations.filter(
        (_, regularisation) => !Number.isNaN(crossValidated(soFar, { length: 0, delay: 0, regularisation })),
      );
      known.push(done.length);
      if (known.length === 1) expect(done).toEqual([2e-6]);
    };
    await choose(memoryHost({ 'a.csv': csvOf({ x, d }) }), documentOf(), place, count);
    expect(known).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9]);
  });
});

describe('choiceJson', () => {
  it('has the keys of the contract, every candidate and null for what is not there', async () => {
    const { choice } = await chosenFrom(documentOf({}, { heldOut: [] }));
    const json = JSON.parse(JSON.stringify(choiceJson(choice)));
    const { lengths, delays, regularisations, nmseDb, standardErrorDb, suggestion } = json;
    for (const cube of [nmseDb, standardErrorDb, json.fitNmseDb]) {
      expect(cube).toHaveLength(lengths.length);
      expect(cube.every((rows: number[][]) => rows.length === delays.length)).toBe(true);
      expect(cube.flat().every((row: number[]) => row.length === regularisations.length)).toBe(true);
      expect(cube.flat(2).every((value: number) => Number.isFinite(value))).toBe(true);
    }
    const { length, delay, regularisation } = suggestion;
    const at = [lengths.indexOf(length), delays.indexOf(delay), regularisations.indexOf(regularisation)];
    expect(nmseDb[at[0]][at[1]][at[2]]).toBe(suggestion.nmseDb);
    expect(suggestion.heldOutNmseDb).toBeNull();
    expect(suggestion.reason).toBe(choice.reason);
  });
});

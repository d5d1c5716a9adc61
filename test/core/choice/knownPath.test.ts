import { describe, expect, it } from 'vitest';
import { gatherStatistics } from '../../../core/choice/blockSums';
import { candidatesOf, crossValidated } from '../../../core/choice/candidate';
import { cutFolds, type Folds } from '../../../core/choice/folds';
import type { Grid } from '../../../core/choice/grid';
import { search } from '../../../core/choice/search';
import type { SearchResult } from '../../../core/choice/searchResult';
import { suggest } from '../../../core/choice/suggest';
import { measureMoments } from '../../../core/pair/moments';
import type { Take } from '../../../core/pair/take';
import { normals, seededUniform } from '../../support/random';
import { convolve, pace, takeOf } from '../../support/takes';

const grid: Grid = {
  lengths: [8, 12, 16, 20, 24, 32, 48],
  delays: [-1, 0, 1],
  regularisations: [1e-8, 1e-2],
};
const fit = 4000;
const samples = 6000;

/** A path of 20 taps of like size in noise of -20 dB; the level of both signals changes by up to ±10 dB between stretches. */
function pathTake(seed: number, varying: boolean): Take {
  const uniform = seededUniform(seed + 7000);
  const level: number[] = Array.from({ length: 15 }, () => (varying ? 10 ** (uniform() - 0.5) : 1));
  const gain = (n: number) => level[Math.floor(n / 400)];
  const x = normals(seed, samples).map((value, n) => gain(n) * value);
  const path = normals(seed + 2000, 20);
  const norm = Math.sqrt(path.reduce((sum, w) => sum + w * w, 0));
  const noise = normals(seed + 4000, samples);
  const d = convolve(
    x,
    path.map((w) => w / norm),
  ).map((value, n) => value + 0.1 * gain(n) * noise[n]);
  return takeOf([x], d, { fit: [{ from: 0, to: fit }], heldOut: [{ from: fit, to: samples }] });
}

async function searchOver(take: Take, folds: Folds, own: Grid): Promise<SearchResult> {
  const moments = await measureMoments([take], true, pace);
  const layout = { inputs: take.inputs.length, length: own.lengths.at(-1) ?? 0, delays: own.delays };
  const statistics = await gatherStatistics([take], folds, layout, moments, pace);
  return search(statistics, layout, own, { first: 0, pace });
}

function crossValidate(take: Take, own: Grid = grid): Promise<SearchResult> {
  const length = own.lengths.at(-1) ?? 0;
  return searchOver(take, cutFolds([take], { length, delays: own.delays, measured: null }), own);
}

/** Fitted on all of the fit interval, measured over the held-out one, for every candidate. */
function inHindsight(take: Take): Promise<SearchResult> {
  const part = (from: number, to: number) => [{ take: 0, intervals: [{ from, to }] }];
  return searchOver(
    take,
    {
      all: part(60, samples - 2),
      folds: [{ training: part(60, fit), blocks: part(fit, samples - 2) }],
      gap: 0,
      by: 'blocks',
      blocks: 1,
      samples: samples - fit - 2,
      leastTraining: fit - 60,
    },
    grid,
  );
}

describe('the suggestion', () => {
  it('finds the 20 taps of a path in noise, whether the level varies or not', async () => {
    const lengths: number[] = [];
    const excess: number[] = [];
    for (let seed = 0; seed < 100; seed++) {
      const take = pathTake(seed, seed % 2 === 1);
      const chosen = suggest(await crossValidate(take), null)?.chosen;
      if (chosen === undefined) throw new Error('no suggestion');
      lengths.push(chosen.length);
      const hindsight = await inHindsight(take);
      const errors = [...candidatesOf(hindsight)].map((candidate) => crossValidated(hindsight, candidate));
      const own = crossValidated(hindsight, {
        length: grid.lengths.indexOf(chosen.length),
        delay: grid.delays.indexOf(chosen.delay),
        regularisation: grid.regularisations.indexOf(chosen.regularisation),
      });
      excess.push(10 * Math.log10(own / Math.min(...errors)));
    }
    // The bounds are the issue's: known truth by seeded simulation.
    expect(lengths.filter((length) => length >= 16 && length <= 32).length).toBeGreaterThanOrEqual(90);
    expect(excess.sort((a, b) => a - b)[50]).toBeLessThan(0.1);
  });
});

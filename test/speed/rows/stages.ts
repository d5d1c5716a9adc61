import { writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { gatherStatistics } from '../../../core/choice/blockSums';
import type { Folds, Part } from '../../../core/choice/folds';
import type { Grid } from '../../../core/choice/grid';
import { search } from '../../../core/choice/search';
import { newPace } from '../../../core/pace';
import { measureMoments } from '../../../core/pair/moments';
import { normals } from '../../support/random';
import { takeOf } from '../../support/takes';
import { longPair, longSamples, writeDoubles, writeWav16 } from '../data';
import { runReference } from '../python';
import { type Row, timed } from '../row';
import { peakOf, runTimed } from './programs';

const pace = newPace();

/** 24 lengths up to 1,024, 33 delays, 9 regularisations. */
const grid: Grid = {
  lengths: Array.from({ length: 24 }, (_, i) => Math.round(8 * 128 ** (i / 23))),
  delays: Array.from({ length: 33 }, (_, i) => i - 16),
  regularisations: Array.from({ length: 9 }, (_, i) => 10 ** (i - 8)),
};

const trained: [number, number] = [1040, 45_000];

let searchOnce: ((onCurves: () => void) => Promise<unknown>) | null = null;
let firstShare = 0;
let inspected = 0;

/** The statistics of one left-out block and of what it is fitted on; the reference gets the data itself. */
async function prepareSearch(folder: string): Promise<void> {
  const samples = 60_000;
  const x = normals(3, samples);
  for (let n = 2; n < samples; n++) x[n] += 1.2 * x[n - 1] - 0.6 * x[n - 2];
  const d = normals(4, samples).map((v, n) => v + (x[n - 5] ?? 0) + 0.4 * (x[n - 40] ?? 0));
  writeDoubles(folder, 'search_x.f64', x);
  writeDoubles(folder, 'search_d.f64', d);
  const take = takeOf([x], d);
  const part = (from: number, to: number): Part => ({ take: 0, intervals: [{ from, to }] });
  const training = [part(...trained)];
  const blocks = [part(47_000, 59_000)];
  const folds: Folds = {
    // The fit interval as it is, gap and all; the fit error is for it.
    all: [part(trained[0], 59_000)],
    folds: [{ training, blocks }],
    gap: 1040,
    by: 'blocks',
    blocks: 1,
    samples: 12_000,
    leastTraining: trained[1] - trained[0],
  };
  const layout = { inputs: 1, length: 1024, delays: grid.delays };
  const moments = await measureMoments([take], true, pace);
  const statistics = await gatherStatistics([take], folds, layout, moments, pace);
  searchOnce = (onCurves) => search(statistics, layout, grid, { first: 1e-4, pace, onCurves });
}

export const stageRows: Row[] = [
  {
    name: 'inspection of a pair: 10 min of 48 kHz 16-bit stereo, process start to end; `coherence` + `welch` in memory',
    goal: 1,
    prepare(folder) {
      const pair = longPair(longSamples);
      writeDoubles(folder, 'x.f64', pair.x);
      writeDoubles(folder, 'd.f64', pair.d);
      writeWav16(join(folder, 'inspected.wav'), 48000, pair);
      const track = (channel: number) => ({ file: 'inspected.wav', channel });
      const take = { inputs: [track(1)], desired: track(2), fit: { from: 0, to: 600 }, heldOut: [] };
      const document = { pairing: 1, job: 'identify', takes: [take], filter: { length: 1024 } };
      writeFileSync(join(folder, 'inspected.pairing.json'), JSON.stringify(document));
    },
    ours: async (folder) => {
      const seconds = await runTimed(
        process.execPath,
        [resolve('dist', 'cli.js'), 'inspect', 'inspected.pairing.json'],
        folder,
      );
      inspected = peakOf();
      return seconds;
    },
    reference: (folder) => runReference('inspection', folder),
    remark: () => `peak ${Math.round(inspected)} MiB`,
  },
  {
    name: 'search over 24 lengths × 33 delays × 9 regularisations, one block; `cho_factor` + `cho_solve` for each length and regularisation',
    goal: 0.25,
    prepare: prepareSearch,
    ours: () =>
      timed(async () => {
        const began = performance.now();
        let first = 0;
        await searchOnce?.(() => {
          if (first === 0) first = performance.now() - began;
        });
        firstShare = first / (performance.now() - began);
      }),
    reference: (folder) => runReference('search', folder),
    remark: () => `first curve after ${Math.round(100 * firstShare)} % of it`,
  },
];

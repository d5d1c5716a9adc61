import { closeSync, openSync, rmSync, writeFileSync, writeSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { newPace } from '../../../core/pace';
import { openText } from '../../../core/recordings/text/openText';
import { openFile } from '../../../extension/node/fileSource';
import { python } from '../../support/programs';
import { longPair, longSamples, writeRf64, writeWav16 } from '../data';
import { runReference, scripts } from '../python';
import { type Row, timed } from '../row';
import { peakOf, runTimed } from './programs';

const csvBytes = 200e6;
const fitSeconds = 400;

/** Ten-minute recordings that fill 4 GiB. */
const repeats = 38;

/** Two columns of nine digits. */
function writeCsv(path: string): void {
  const { x, d } = longPair(1 << 16);
  let block = '';
  for (let n = 0; n < x.length; n++) block += `${x[n].toPrecision(9)},${d[n].toPrecision(9)}\n`;
  const file = openSync(path, 'w');
  writeSync(file, 'x,d\n');
  for (let written = 0; written < csvBytes; written += block.length) writeSync(file, block);
  closeSync(file);
}

let peak = 0;

export const fileRows: Row[] = [
  {
    name: 'reading a 200 MB CSV of two columns; pandas',
    goal: 1.5,
    prepare: (folder) => writeCsv(join(folder, 'long.csv')),
    ours: (folder) =>
      timed(async () => {
        const source = await openFile(join(folder, 'long.csv'));
        if (typeof source === 'string') throw new Error(source);
        const { recording } = await openText(source, 'long.csv', newPace());
        if (recording === null) throw new Error('not read');
        await recording.read([0, 1], 0, recording.samples);
        await source.close();
      }),
    reference: (folder) => runReference('csv', folder),
  },
  {
    name: 'whole job: 10 min of 48 kHz 16-bit stereo, 1,024 taps; a SciPy script',
    goal: 0.4,
    prepare(folder) {
      writeWav16(join(folder, 'long.wav'), 48000, longPair(longSamples));
      writeDocument(folder, 'long', 1);
    },
    ours: async (folder) => {
      const seconds = await designTimed(folder, 'long');
      peak = peakOf();
      return seconds;
    },
    reference: (folder) =>
      runTimed(python, [resolve(scripts, 'wholeJob.py'), 'long.wav', String(fitSeconds)], folder),
    remark: () => `peak ${Math.round(peak)} MiB`,
  },
  {
    name: `whole job on 4 GiB: ${repeats} times as long, RF64; our time for 10 min times ${repeats}`,
    goal: 1.1,
    long: true,
    prepare(folder) {
      const pair = longPair(longSamples);
      writeWav16(join(folder, 'long.wav'), 48000, pair);
      writeDocument(folder, 'long', 1);
      writeRf64(join(folder, 'huge.wav'), 48000, pair, repeats);
      writeDocument(folder, 'huge', repeats);
    },
    ours: async (folder) => {
      const seconds = await designTimed(folder, 'huge');
      peak = peakOf();
      return seconds;
    },
    reference: async (folder) => repeats * (await designTimed(folder, 'long')),
    remark: () => `peak ${Math.round(peak)} MiB`,
  },
];

function writeDocument(folder: string, name: string, times: number): void {
  const track = (channel: number) => ({ file: `${name}.wav`, channel });
  const document = {
    pairing: 1,
    title: 'Long',
    job: 'identify',
    takes: [
      {
        inputs: [track(1)],
        desired: track(2),
        fit: { from: 0, to: times * fitSeconds },
        heldOut: { from: times * fitSeconds, to: times * 600 },
      },
    ],
    filter: { length: 1024 },
    write: { symbol: 'long_path' },
  };
  writeFileSync(join(folder, `${name}.pairing.json`), JSON.stringify(document));
}

/** Seconds from process start to files written. */
function designTimed(folder: string, name: string): Promise<number> {
  rmSync(join(folder, 'generated'), { recursive: true, force: true });
  return runTimed(process.execPath, [resolve('dist', 'cli.js'), 'design', `${name}.pairing.json`], folder);
}

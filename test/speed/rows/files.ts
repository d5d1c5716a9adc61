import { closeSync, openSync, rmSync, writeFileSync, writeSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { newPace } from '../../../core/pace';
import { openText } from '../../../core/recordings/text/openText';
import { openFile } from '../../../extension/node/fileSource';
import { python } from '../../support/programs';
import { longPair, longSamples, writeWav16 } from '../data';
import { runReference, scripts } from '../python';
import { type Row, timed } from '../row';
import { peakOf, runTimed } from './programs';

const csvBytes = 200e6;
const fitSeconds = 400;

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
      const track = (channel: number) => ({ file: 'long.wav', channel });
      const document = {
        pairing: 1,
        title: 'Long',
        job: 'identify',
        takes: [
          {
            inputs: [track(1)],
            desired: track(2),
            fit: { from: 0, to: fitSeconds },
            heldOut: { from: fitSeconds, to: 600 },
          },
        ],
        filter: { length: 1024 },
        write: { symbol: 'long_path' },
      };
      writeFileSync(join(folder, 'long.pairing.json'), JSON.stringify(document));
    },
    ours: async (folder) => {
      rmSync(join(folder, 'generated'), { recursive: true, force: true });
      const cli = resolve('dist', 'cli.js');
      const seconds = await runTimed(process.execPath, [cli, 'design', 'long.pairing.json'], folder);
      peak = peakOf();
      return seconds;
    },
    reference: (folder) =>
      runTimed(python, [resolve(scripts, 'wholeJob.py'), 'long.wav', String(fitSeconds)], folder),
    remark: () => `peak ${Math.round(peak)} MiB`,
  },
];

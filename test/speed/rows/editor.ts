import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { monitorEventLoopDelay } from 'node:perf_hooks';
import type { EnvelopeRequest } from '../../../core/protocol/messages';
import { Session } from '../../../extension/editors/session';
import { nodeWorker } from '../../../extension/node/nodeWorker';
import { WorkerClient } from '../../../extension/workerClient';
import { longPair, longSamples, writeWav16 } from '../data';
import { type Row, timed } from '../row';
import { runTimed } from './programs';

// The editor's host and its worker, a thread of its own, on 10 minutes of 48 kHz 16-bit stereo.

const file = 'edited.wav';
const filter = { length: 64, delay: 0, regularisation: 1e-4 };

/** An open pairing as the extension host has it, without the workbench. */
class Opened {
  private readonly client = new WorkerClient(
    () => nodeWorker(resolve('dist', 'worker.js')),
    { stat: async () => 'missing', read: async () => new Uint8Array(0) },
    (why) => {
      throw new Error(why);
    },
  );
  private readonly session: Session;
  private change = {};
  private ended = false;

  constructor(folder: string) {
    this.session = new Session({
      begin: (generation) =>
        this.client.call.update({
          session: 'a',
          generation,
          root: { kind: 'local', folder },
          place: { file: 'edited.pairing.json', folder: '' },
          text: textOf(this.change),
        }),
      wordsFor: (_kind, why) => {
        // Work that is given up at the end fails, as it should.
        if (!this.ended) throw new Error(why);
        return why;
      },
      showBusy: () => {},
    });
    this.client.join('a', this.session);
  }

  /** Changes the filter and returns the seconds until a part of the new result came. */
  async until(part: 'recordings' | 'figures', change: object): Promise<number> {
    this.change = change;
    this.session.advance();
    return timed(async () => {
      this.session.run();
      await this.session.partSettled(part);
    });
  }

  envelope(from: number, to: number): Promise<unknown> {
    const lanes = ['input:0', 'desired'];
    const request: EnvelopeRequest = { take: 0, lanes, from, to, columns: 4000 };
    return this.client.call.envelope({ session: 'a', ...request });
  }

  end(): void {
    this.ended = true;
    this.client.dispose();
  }
}

function textOf(change: object): string {
  const take = {
    inputs: [{ file, channel: 1 }],
    desired: { file, channel: 2 },
    fit: { from: 0, to: 400 },
    heldOut: { from: 400, to: 600 },
  };
  return JSON.stringify({ pairing: 1, job: 'identify', takes: [take], filter: { ...filter, ...change } });
}

function prepare(folder: string): void {
  if (!existsSync(join(folder, file))) writeWav16(join(folder, file), 48000, longPair(longSamples));
}

const readByCommand = (folder: string) =>
  runTimed(process.execPath, [resolve('dist', 'cli.js'), 'inspect', file], folder);

const wait = (milliseconds: number) => new Promise((turn) => setTimeout(turn, milliseconds));

let ready: Promise<Opened> | null = null;

/** One that has shown everything and got ready for changes. */
function readyOne(folder: string): Promise<Opened> {
  ready ??= (async () => {
    const opened = new Opened(folder);
    await opened.until('figures', {});
    // What is made ready comes last and says nothing.
    await wait(40_000);
    return opened;
  })();
  return ready;
}

let turn = 0;

export const editorRows: Row[] = [
  {
    name: 'editor, first waveform of 10 min of 48 kHz stereo, a new worker; `tapwright inspect` of the file, process start to end',
    goal: 1.5,
    prepare,
    ours: async (folder) => {
      const opened = new Opened(folder);
      const seconds = await timed(async () => {
        await opened.until('recordings', {});
        await opened.envelope(0, longSamples);
      });
      opened.end();
      return seconds;
    },
    reference: readByCommand,
  },
  {
    name: 'editor, held-out figure of a changed length, delay and regularisation in turn; 150 ms',
    goal: 1,
    prepare,
    ours: async (folder) => {
      const changes = [{ length: 80 }, { delay: 1 }, { regularisation: 1e-3 }, { length: 48 }];
      return (await readyOne(folder)).until('figures', changes[turn++ % changes.length]);
    },
    reference: async () => 0.15,
  },
  {
    name: 'editor, 4,000 columns of two lanes after a zoom while the worker is busy; 33 ms',
    goal: 1,
    prepare,
    ours: async (folder) => {
      const from = Math.floor(longSamples * 0.3) + 1000 * turn++;
      const opened = await readyOne(folder);
      // A change whose evidence takes seconds.
      await opened.until('figures', { length: 40 + turn });
      await wait(300);
      return timed(() => opened.envelope(from, from + 200_000));
    },
    reference: async () => 0.033,
  },
  {
    name: 'editor, longest time that the extension host is held up by a pairing from opening to its figures; 50 ms',
    goal: 1,
    prepare,
    ours: async (folder) => {
      const delays = monitorEventLoopDelay({ resolution: 1 });
      const opened = new Opened(folder);
      delays.enable();
      await opened.until('figures', {});
      delays.disable();
      opened.end();
      return delays.max / 1e9;
    },
    reference: async () => 0.05,
  },
];

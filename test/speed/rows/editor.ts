import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { MessageChannel } from 'node:worker_threads';
import type { EnvelopeRequest, FromWorker, WorkerCalls } from '../../../core/protocol/messages';
import { type Frame, link, type Port, type Remote } from '../../../core/protocol/rpc';
import { localFiles } from '../../../extension/node/localFiles';
import { newSha256 } from '../../../extension/node/nodeHost';
import { serve } from '../../../extension/worker/service';
import { longPair, longSamples, writeWav16 } from '../data';
import { type Row, timed } from '../row';
import { runTimed } from './programs';

// The editor's worker on 10 minutes of 48 kHz 16-bit stereo, over its message channel, against the command line.

const file = 'edited.wav';
const filter = { length: 64, delay: 0, regularisation: 1e-4 };

interface Worker {
  call: Remote<WorkerCalls>;
  /** Milliseconds from the update to each part as it came, the last update's. */
  came: { part: string; at: number }[];
}

function newWorker(): Worker {
  const { port1, port2 } = new MessageChannel();
  const portOf = (port: typeof port1): Port => ({
    post: (message, transfer) => port.postMessage(message, transfer),
    listen: (receive) => void port.on('message', (message: Frame) => receive(message)),
  });
  serve(portOf(port2), { localFiles, newSha256 });
  const came: Worker['came'] = [];
  const { call } = link<WorkerCalls>(portOf(port1), {}, (notice: FromWorker) => {
    if (notice.type === 'part') came.push({ part: notice.part, at: performance.now() });
  });
  return { call, came };
}

let generation = 0;

/** Starts an update and returns the seconds until a part came. */
async function until(
  { call, came }: Worker,
  folder: string,
  part: string,
  change: object,
): Promise<{ seconds: number; done: Promise<unknown> }> {
  const take = {
    inputs: [{ file, channel: 1 }],
    desired: { file, channel: 2 },
    fit: { from: 0, to: 400 },
    heldOut: { from: 400, to: 600 },
  };
  const text = JSON.stringify({
    pairing: 1,
    job: 'identify',
    takes: [take],
    filter: { ...filter, ...change },
  });
  came.length = 0;
  const began = performance.now();
  const place = { file: 'edited.pairing.json', folder: '' };
  const root = { kind: 'local', folder } as const;
  const done = call.update({ session: 'a', generation: ++generation, root, place, text });
  for (;;) {
    const found = came.find((of) => of.part === part);
    if (found !== undefined) return { seconds: (found.at - began) / 1000, done };
    await new Promise((turn) => setTimeout(turn, 1));
  }
}

function prepare(folder: string): void {
  if (existsSync(join(folder, file))) return;
  writeWav16(join(folder, file), 48000, longPair(longSamples));
}

const readByCommand = (folder: string) =>
  runTimed(process.execPath, [resolve('dist', 'cli.js'), 'inspect', file], folder);

let ready: Worker | null = null;
let length = filter.length;

/** A worker that has shown the pairing and got ready for changes. */
async function readyWorker(folder: string): Promise<Worker> {
  if (ready !== null) return ready;
  ready = newWorker();
  const { done } = await until(ready, folder, 'figures', {});
  await done;
  // What is made ready comes after the end of the update: an envelope waits for nothing else.
  await new Promise((turn) => setTimeout(turn, 15_000));
  return ready;
}

const zoomed = (from: number, to: number): { session: string } & EnvelopeRequest => ({
  session: 'a',
  take: 0,
  lanes: ['input:0', 'desired'],
  from,
  to,
  columns: 4000,
});

export const editorRows: Row[] = [
  {
    name: 'editor, first waveform: from the update to its envelope; `tapwright inspect` of the file, process start to end',
    goal: 1.5,
    prepare,
    ours: async (folder) => {
      const worker = newWorker();
      const began = performance.now();
      const { done } = await until(worker, folder, 'recordings', {});
      await worker.call.envelope(zoomed(0, longSamples));
      const seconds = (performance.now() - began) / 1000;
      await worker.call.forget({ session: 'a' });
      await done.catch(() => {});
      return seconds;
    },
    reference: readByCommand,
  },
  {
    name: 'editor, held-out figure of a changed length; 150 ms',
    goal: 1,
    prepare,
    ours: async (folder) => {
      const worker = await readyWorker(folder);
      length = length === 64 ? 80 : 64;
      const { seconds } = await until(worker, folder, 'figures', { length });
      return seconds;
    },
    reference: async () => 0.15,
  },
  {
    name: 'editor, 4,000 columns of two lanes after a zoom, the worker busy; 33 ms',
    goal: 1,
    prepare,
    ours: async (folder) => {
      const { call } = await readyWorker(folder);
      const from = Math.floor(longSamples * 0.3) + 1000 * generation++;
      return timed(() => call.envelope(zoomed(from, from + 200_000)));
    },
    reference: async () => 0.033,
  },
];

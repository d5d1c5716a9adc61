import { cpSync, mkdtempSync, readFileSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { MessageChannel } from 'node:worker_threads';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Envelope, FromWorker, HostCalls, WorkerCalls } from '../../../core/protocol/messages';
import { unpack } from '../../../core/protocol/pack';
import { type Frame, link, type Port } from '../../../core/protocol/rpc';
import type { Views } from '../../../core/protocol/views';
import { localFiles } from '../../../extension/node/localFiles';
import { newSha256 } from '../../../extension/node/nodeHost';
import { serve } from '../../../extension/worker/service';

// The worker's service over a real message channel, on a copy of the sample bench.

const folder = mkdtempSync(join(tmpdir(), 'tapwright-worker-'));
const root = { kind: 'local', folder } as const;
const place = { file: 'belt.pairing.json', folder: '' };
const text = () => readFileSync(join(folder, place.file), 'utf8');

const { port1, port2 } = new MessageChannel();
const notices: FromWorker[] = [];
const portOf = (port: typeof port1): Port => ({
  post: (message, transfer) => port.postMessage(message, transfer),
  listen: (receive) => void port.on('message', (message: Frame) => receive(message)),
});
const noHost: HostCalls = {
  stat: async () => 'missing',
  read: async () => new Uint8Array(0),
};

beforeAll(() => cpSync(join(__dirname, '../../../media/bench'), folder, { recursive: true }));
afterAll(() => {
  port1.close();
  port2.close();
  rmSync(folder, { recursive: true });
});

serve(portOf(port2), { localFiles, newSha256 });
const { call } = link<WorkerCalls, HostCalls>(portOf(port1), noHost, (notice: FromWorker) => {
  notices.push(notice);
});

let generation = 0;
async function update(documentText: string): Promise<FromWorker[]> {
  notices.length = 0;
  await call.update({ session: 'a', generation: ++generation, root, place, text: documentText });
  // Notices sent before the reply have arrived before it.
  return [...notices];
}

function part<P extends keyof Views>(told: readonly FromWorker[], name: P): Views[P] | null {
  const found = told.filter((notice) => notice.type === 'part' && notice.part === name).at(-1);
  if (found?.type !== 'part') throw new Error(`no part ${name}`);
  return found.view === null ? null : unpack<Views[P]>(found.view);
}

const edited = (change: (document: { filter: Record<string, unknown> }) => void) => {
  const document = JSON.parse(text());
  change(document);
  return JSON.stringify(document);
};

describe('the worker', () => {
  it('tells every part of a pairing, the figures as the command line has them', async () => {
    const told = await update(text());
    const parts = told.filter((notice) => notice.type === 'part').map((notice) => notice.part);
    expect([...new Set(parts)]).toEqual([
      'recordings',
      'figures',
      'suitability',
      'evidence',
      'firmware',
      'choice',
    ]);
    // The figure that the bench's note states, from test/bench.
    expect(part(told, 'figures')?.heldOutDb).toBeCloseTo(-26.23, 2);
    expect(part(told, 'recordings')?.takes[0].tracks).toHaveLength(3);
    expect(part(told, 'firmware')?.state).toBe('not-written');
    expect(part(told, 'choice')?.suggestion?.reason).toMatch(/taps/);
    expect(told.at(-1)).toMatchObject({ type: 'idle', stopped: false });
  });

  it('sends a part again only where it has changed', async () => {
    await update(text());
    const told = await update(text().replace('"belt"', '"strap"'));
    const sent = told.filter((notice) => notice.type === 'part' && notice.view !== null);
    expect(sent.map((notice) => notice.type === 'part' && notice.part)).toEqual(['firmware']);
  });

  it('ends an earlier request when a later one comes, and answers both', async () => {
    const first = call.update({ session: 'a', generation: ++generation, root, place, text: text() });
    const second = call.update({
      session: 'a',
      generation: ++generation,
      root,
      place,
      text: edited(({ filter }) => {
        filter.length = 24;
      }),
    });
    notices.length = 0;
    await Promise.all([first, second]);
    expect(notices.at(-1)).toMatchObject({ type: 'idle', generation, stopped: false });
    expect(part(notices, 'figures')?.taps).toBe(24);
  });

  it('has no files of an older design to write where the newer one was stopped', async () => {
    await update(text());
    expect(await call.files({ session: 'a', generation })).not.toBeNull();
    const longer = edited(({ filter }) => {
      filter.length = 300;
    });
    const stopped = update(longer);
    await call.stop({ session: 'a' });
    expect((await stopped).at(-1)).toMatchObject({ type: 'idle', generation, stopped: true });
    expect(await call.files({ session: 'a', generation })).toBeNull();
    await update(longer);
    const files = await call.files({ session: 'a', generation });
    const header = files?.find(({ path }) => path.endsWith('_taps.h'));
    expect(new TextDecoder().decode(header?.bytes)).toMatch(/BELT_LENGTH\s+300\b/);
  });

  it('still shows the recordings and the suitability where a blocker stops the design', async () => {
    const told = await update(
      edited(({ filter }) => {
        filter.length = 5000;
      }),
    );
    expect(part(told, 'suitability')?.findings[0]).toMatchObject({ severity: 'blocker' });
    expect(told).toContainEqual(expect.objectContaining({ type: 'part', part: 'evidence', failed: true }));
  });

  it('shows no error where the delay asks for samples beyond the recording', async () => {
    for (const [delay, from, beyond] of [
      [-8, 19_190, [2, 3, 4, 5, 6, 7, 8, 9]],
      [3, 0, [0, 1, 2]],
    ] as const) {
      await update(
        edited(({ filter }) => {
          Object.assign(filter, { length: 8, delay });
        }),
      );
      const run = {
        session: 'a',
        take: 0,
        lanes: ['target', 'output', 'error'] as const,
        from,
        to: from + 10,
      };
      const { lanes } = unpack<Envelope>(await call.envelope({ ...run, lanes: [...run.lanes], columns: 10 }));
      const missing = lanes.map(({ low }) => [...low].flatMap((value, n) => (Number.isNaN(value) ? n : [])));
      expect(missing).toEqual([beyond, [], beyond]);
    }
  });

  it('gives envelopes that hold every sample, from afar and from near', async () => {
    await update(text());
    const whole = unpack<Envelope>(
      await call.envelope({
        session: 'a',
        take: 0,
        lanes: ['input:0', 'desired'],
        from: 0,
        to: 120_000,
        columns: 500,
      }),
    );
    const near = unpack<Envelope>(
      await call.envelope({ session: 'a', take: 0, lanes: ['input:0'], from: 1000, to: 1200, columns: 500 }),
    );
    expect(near).toMatchObject({ from: 1000, step: 1 });
    expect(near.lanes[0].low).toHaveLength(200);
    const column = Math.floor((1000 - whole.from) / whole.step);
    // Single precision of the outline.
    const low = Math.min(...whole.lanes[0].low.subarray(column, column + Math.ceil(200 / whole.step) + 1));
    expect(low).toBeLessThanOrEqual(Math.min(...near.lanes[0].low) + 1e-6);
  });

  it('shows what is left by the filter as the difference of the two', async () => {
    await update(text());
    const run = unpack<Envelope>(
      await call.envelope({
        session: 'a',
        take: 0,
        lanes: ['target', 'output', 'error'],
        from: 9_000,
        to: 9_100,
        columns: 400,
      }),
    );
    const [target, output, error] = run.lanes.map(({ low }) => low);
    expect(error[7]).toBeCloseTo(target[7] - output[7], 12);
  });

  it('reads a recording again only when it has changed', async () => {
    await update(text());
    const before = await update(text());
    expect(before.some((notice) => notice.type === 'part' && notice.view !== null)).toBe(false);
    const [file] = part(await updateFresh(), 'recordings')!.files;
    const path = join(folder, file.file);
    const bytes = readFileSync(path);
    writeFileSync(path, bytes.subarray(0, Math.floor(bytes.length / 2)));
    utimesSync(path, new Date(), new Date());
    const after = await update(text());
    expect(part(after, 'recordings')?.files[0].samples).toBeLessThan(file.samples);
    writeFileSync(path, bytes);
  });

  it('lets the pairing go first that was asked for last', async () => {
    notices.length = 0;
    const asked = (session: string) =>
      call.update({ session, generation: ++generation, root, place, text: text() });
    await call.forget({ session: 'a' });
    await Promise.all([asked('behind'), asked('in front')]);
    const ends = notices.filter(({ type }) => type === 'idle').map(({ session }) => session);
    expect(ends).toEqual(['in front', 'behind']);
    await Promise.all(['behind', 'in front'].map((session) => call.forget({ session })));
  });

  it('gives an error back to its caller', async () => {
    await expect(
      call.envelope({ session: 'a', take: 9, lanes: ['desired'], from: 0, to: 10, columns: 10 }),
    ).rejects.toThrow('no lane desired in take 9');
  });
});

async function updateFresh(): Promise<FromWorker[]> {
  await call.forget({ session: 'a' });
  return update(text());
}

import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { MessageChannel } from 'node:worker_threads';
import { afterAll, describe, expect, it } from 'vitest';
import type { HostCalls, Root, WorkerCalls, WrittenView } from '../../../core/protocol/messages';
import { type Frame, link, type Port } from '../../../core/protocol/rpc';
import { Lookout, type Memory, memoryOf } from '../../../extension/beside/lookout';
import { PairingIndex } from '../../../extension/beside/pairingIndex';
import type { Entry } from '../../../extension/beside/standing';
import { type FolderReader, hostCalls } from '../../../extension/files/hostCalls';
import { localFiles } from '../../../extension/node/localFiles';
import { newSha256 } from '../../../extension/node/nodeHost';
import { serve } from '../../../extension/worker/service';
import { entryOf, viewOf } from './entries';

/** A lookout over an index, with what it was asked and what it told. */
function lookoutOf(entries: readonly Entry[], answer: (entry: Entry) => Promise<WrittenView | null>) {
  const index = new PairingIndex();
  for (const entry of entries) index.put(entry);
  const told: string[] = [];
  const asked: string[] = [];
  const lookout = new Lookout({
    index,
    look: (entry) => {
      asked.push(entry.document);
      return answer(entry);
    },
    looked: (entry, changed) => told.push(`${entry.document} ${changed}`),
    failed: (entry, error) => told.push(`${entry.document} ${error}`),
  });
  return { index, lookout, told, asked };
}

describe('the lookout', () => {
  it('looks at each pairing once however often it is asked for in a moment', async () => {
    const { lookout, asked, index } = lookoutOf([entryOf('a'), entryOf('b')], async () => viewOf({}));
    lookout.ask(['a', 'b']);
    lookout.ask(['b', 'a', 'gone']);
    await lookout.settled();
    expect(asked).toEqual(['a', 'b']);
    expect(index.get('a')?.view?.state).toBe('current');
  });

  it('looks again where it is asked while it looks', async () => {
    const { lookout, asked } = lookoutOf([entryOf('a')], async () => {
      if (asked.length === 1) lookout.ask(['a']);
      return viewOf({});
    });
    lookout.ask(['a']);
    await lookout.settled();
    expect(asked).toEqual(['a', 'a']);
  });

  it('keeps what a check found meanwhile, and drops it once files have changed', async () => {
    const checked = { ...entryOf('a', viewOf({})), checked: [] };
    const { lookout, index, asked } = lookoutOf([entryOf('a', viewOf({}))], async () => {
      if (asked.length === 1) index.put(checked);
      return null;
    });
    lookout.ask(['a']);
    await lookout.settled();
    expect(index.get('a')).toBe(checked);
    const later = lookoutOf([checked], async () => viewOf({ state: 'edited' }));
    later.lookout.ask(['a']);
    await later.lookout.settled();
    expect(later.index.get('a')?.checked).toBeNull();
  });

  it('goes on where one fails, and forgets one that was removed', async () => {
    const { lookout, told, index } = lookoutOf([entryOf('a'), entryOf('b'), entryOf('c')], async (entry) => {
      if (entry.document === 'a') throw new Error('no worker');
      if (entry.document === 'b') index.remove('b');
      return viewOf({});
    });
    lookout.ask(['a', 'b', 'c']);
    await lookout.settled();
    expect(told).toEqual(['a Error: no worker', 'c true']);
  });
});

/** A channel to a worker's service, in this thread. */
function workerOf(host: HostCalls) {
  const { port1, port2 } = new MessageChannel();
  const portOf = (port: typeof port1): Port => ({
    post: (message, transfer) => port.postMessage(message, transfer),
    listen: (receive) => void port.on('message', (message: Frame) => receive(message)),
  });
  serve(portOf(port2), { localFiles, newSha256 });
  const { call } = link<WorkerCalls, HostCalls>(portOf(port1), host);
  const close = () => {
    port1.close();
    port2.close();
  };
  return { call, close };
}

/** Adds up the time within the host's own code: the worker's service runs in this thread as well. */
function newStopwatch() {
  let spent = 0;
  return {
    spent: () => spent,
    own<T>(work: () => T): T {
      const begun = performance.now();
      const result = work();
      spent += performance.now() - begun;
      return result;
    },
  };
}

describe('200 pairings at the start', () => {
  const folder = mkdtempSync(join(tmpdir(), 'tapwright-beside-'));
  afterAll(() => rmSync(folder, { recursive: true }));

  const bench = join(__dirname, '../../../media/bench');
  const text = readFileSync(join(bench, 'valve.pairing.json'), 'utf8');
  const names = Array.from({ length: 200 }, (_, i) => `valve${i}.pairing.json`);
  cpSync(join(bench, 'valve.csv'), join(folder, 'valve.csv'));
  for (const name of names) writeFileSync(join(folder, name), text);

  /** Looks at all of them, what was seen of them at hand. */
  async function start(root: Root, host: HostCalls, memory: Memory) {
    const { own, spent } = newStopwatch();
    const { call, close } = workerOf(host);
    const entries = names.map((name) => ({ ...entryOf(name, memory[name] ?? null), folder: '' }));
    const all = lookoutOf(entries, ({ file, view }) =>
      own(() => call.written({ root, place: { file, folder: '' }, seen: view?.seen ?? null })),
    );
    own(() => all.lookout.ask(names));
    await all.lookout.settled();
    const kept: Memory = own(() => JSON.parse(JSON.stringify(memoryOf(all.index.all))));
    own(() => [...all.index.symbols()]);
    close();
    return { ...all, kept, spent: spent() };
  }

  const noHost: HostCalls = {
    stat: async ({ path }) => {
      throw new Error(`asked for ${path}`);
    },
    read: async ({ path }) => {
      throw new Error(`asked for ${path}`);
    },
  };

  it('cost the host one call each, no reading, and less than a second, on a local disk', async () => {
    const root = { kind: 'local', folder } as const;
    const first = await start(root, noHost, {});
    expect(first.asked).toHaveLength(200);
    expect(first.index.all.every(({ view }) => view?.state === 'not-written')).toBe(true);
    expect(first.spent).toBeLessThan(1000);

    // A restart: everything is as it was seen, and nothing changes.
    const again = await start(root, noHost, first.kept);
    expect(again.told).toEqual(names.map((name) => `${name} false`));
    expect(again.spent).toBeLessThan(1000);

    writeFileSync(join(folder, names[7]), `${text} `);
    const touched = await start(root, noHost, first.kept);
    expect(touched.told.filter((line) => line.endsWith('true'))).toEqual([`${names[7]} true`]);
    writeFileSync(join(folder, names[7]), text);
  }, 120_000);

  it('cost three looks at sizes and times each where only the host can read, nothing being read again', async () => {
    const counts = { stat: 0, list: 0, read: 0 };
    let spent = 0;
    const begun = () => {
      const at = performance.now();
      return () => {
        spent += performance.now() - at;
      };
    };
    const disk: FolderReader = {
      stat: async (address) => {
        counts.stat++;
        const { size, mtimeMs } = statSync(address);
        return { type: 1, size, mtime: mtimeMs };
      },
      list: async () => {
        counts.list++;
        return readdirSync(folder).map((name) => [name, 1] as const);
      },
      read: async (address) => {
        counts.read++;
        return readFileSync(address);
      },
      join: (address, path) => join(address, path),
      missing: (error) => (error as NodeJS.ErrnoException).code === 'ENOENT',
    };
    const answers = hostCalls(disk);
    const timed: HostCalls = {
      async stat(request) {
        const end = begun();
        const answer = await answers.stat(request);
        end();
        return answer;
      },
      read: answers.read,
    };
    const root = { kind: 'host', uri: folder } as const;
    const first = await start(root, timed, {});
    // Each document, and once the recording that all of them share.
    expect(counts.read).toBe(201);
    Object.assign(counts, { stat: 0, list: 0, read: 0 });
    spent = 0;
    const again = await start(root, timed, first.kept);
    expect(again.told).toEqual(names.map((name) => `${name} false`));
    // Document, recording and taps file, which is missing and found so by one look.
    expect(counts.stat).toBeLessThanOrEqual(600);
    expect(counts.read).toBe(0);
    expect(again.spent + spent).toBeLessThan(1000);
  }, 120_000);
});

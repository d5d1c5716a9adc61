import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import { newPace, Stopped } from '../../../core/pace';
import { design } from '../../../core/pipeline/design';
import { newNodeHost } from '../../../extension/node/nodeHost';
import { nodeWorker } from '../../../extension/node/nodeWorker';
import { WorkerClient } from '../../../extension/workerClient';
import { project, snapshot } from '../../support/cli';
import { noHostFiles } from '../../support/noHostFiles';
import { leftovers, patience, small, smallDocument, smallPairing, withFault } from './smallPairing';

// Work that is given up at any moment: between two blocks, in the worker, and on the command line.

describe('a design that is given up', { timeout: patience }, () => {
  it('between any two blocks leaves the folder as it was and says that it was stopped', async () => {
    const folder = smallPairing();
    const before = snapshot(folder);
    let stoppedAt = 0;
    for (let last = 1; ; last++) {
      let steps = 0;
      const host = newNodeHost(
        folder,
        newPace(() => ++steps > last),
      );
      const outcome = await design(host, smallDocument(), { file: small, folder: '' }).catch(
        (error) => error,
      );
      await host.close();
      if (!(outcome instanceof Stopped)) {
        expect(outcome.result).not.toBeNull();
        break;
      }
      stoppedAt = last;
    }
    expect(stoppedAt).toBeGreaterThan(3);
    expect(snapshot(folder)).toEqual(before);
  });

  it('on the command line leaves nothing, or files that are whole, and no list of them', () => {
    for (const [of, at] of [
      ['reads', 3],
      ['writes', 8],
    ] as const) {
      const folder = smallPairing();
      expect(withFault(folder, { of, at, signal: 'SIGINT' }, 'design', small).signal).toBe('SIGINT');
      expect(existsSync(join(folder, 'generated', 'case.taps.json'))).toBe(false);
      expect(withFault(folder, { of, at: 0 }, 'design', small).status).toBe(0);
      expect(leftovers(folder)).toEqual([]);
    }
  });
});

describe('a worker that is stopped', { timeout: patience }, () => {
  let client: WorkerClient | null = null;
  afterEach(() => client?.dispose());

  it('after any of its notices has all files of the newest text to write, or none', async () => {
    const folder = smallPairing();
    const script = join(project, 'dist', 'worker.js');
    const worker = new WorkerClient(
      () => nodeWorker(script),
      noHostFiles,
      () => {},
    );
    client = worker;
    let [heard, stopAfter] = [0, 0];
    worker.join('one', {
      hear() {
        if (++heard === stopAfter) void worker.call.stop({ session: 'one' });
      },
      lost: () => {},
    });
    const compute = async (generation: number, length: number, session = 'one') => {
      heard = 0;
      const root = { kind: 'local', folder } as const;
      const place = { file: small, folder: '' };
      await worker.call.update({ session, generation, root, place, text: smallDocument(length) });
      return worker.call.files({ session, generation });
    };
    const expected = (length: number) => compute(length, length, 'never stopped');
    const counts = { none: 0, all: 0 };
    for (let stop = 1; stop <= 15; stop++) {
      stopAfter = stop;
      const files = await compute(stop, 4 + stop);
      if (files === null) counts.none++;
      else {
        counts.all++;
        expect(files).toEqual(await expected(4 + stop));
      }
    }
    expect(counts.none).toBeGreaterThan(0);
    stopAfter = 0;
    const whole = await compute(16, 30);
    expect(whole?.length).toBeGreaterThan(3);
    expect(whole).toEqual(await expected(30));
    expect(existsSync(join(folder, 'generated'))).toBe(false);
    expect(readFileSync(join(folder, small), 'utf8')).toBe(smallDocument());
  });
});

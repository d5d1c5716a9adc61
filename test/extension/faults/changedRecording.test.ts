import { existsSync, readFileSync, renameSync, rmSync, truncateSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import type { FromWorker } from '../../../core/protocol/messages';
import { unpack } from '../../../core/protocol/pack';
import type { Views } from '../../../core/protocol/views';
import { nodeWorker } from '../../../extension/node/nodeWorker';
import { WorkerClient } from '../../../extension/workerClient';
import { benchCopy, project, tapwright } from '../../support/cli';
import { noHostFiles } from '../../support/noHostFiles';
import { patience, small, smallPairing, smallRecording, withFault } from './smallPairing';

// Recordings that change, shrink or disappear while they are read: real files, changed by another process before one of
// the command line's reads, or beside the worker at work.

/** The text of `f` with other numbers of the same length. */
const other = "fs.readFileSync(f, 'utf8').replaceAll('5', '6')";

describe('a recording that changes under the command line', { timeout: patience }, () => {
  const designAt = (at: number, change: string) => {
    const folder = smallPairing();
    const run = `const fs = require('node:fs'), f = ${JSON.stringify(join(folder, 'a.csv'))}; ${change}`;
    return { folder, ...withFault(folder, { of: 'reads', at, run }, 'design', small) };
  };

  it.each([
    ['becomes shorter', 'fs.truncateSync(f, 3000)'],
    ['becomes longer', "fs.appendFileSync(f, '1,2\\n')"],
    ['gets other samples', `fs.writeFileSync(f, ${other})`],
  ])('and %s is told, and nothing is written', (_, change) => {
    // Before the first read, and between two passes.
    for (const at of [1, 5]) {
      const { folder, status, out, err } = designAt(at, change);
      expect(err, `${at}`).toMatch(/^.*\ba\.csv:.*the file changed while .*\[file-changed\]$/m);
      expect(err + out).not.toMatch(/\n\s+at /);
      expect([status, existsSync(join(folder, 'generated'))]).toEqual([2, false]);
    }
  });

  it('or disappears is read to its end, and missed by check', () => {
    const { folder, status } = designAt(3, 'fs.unlinkSync(f)');
    expect(status).toBe(0);
    const check = tapwright(folder, 'check', small);
    expect([check.status, check.out]).toEqual([2, expect.stringContaining('[missing-file]')]);
    writeFileSync(join(folder, 'a.csv'), smallRecording());
    expect(tapwright(folder, 'check', small).status).toBe(0);
  });

  it('or is replaced by another is read as it was, and told by check', () => {
    const { folder, status } = designAt(3, `fs.writeFileSync(f + 'x', ${other}); fs.renameSync(f + 'x', f)`);
    expect(status).toBe(0);
    const check = tapwright(folder, 'check', small);
    expect([check.status, check.out]).toEqual([1, expect.stringContaining('[stale-recording]')]);
  });
});

describe('a recording that changes under the worker', { timeout: patience }, () => {
  let client: WorkerClient | null = null;
  afterEach(() => client?.dispose());

  it('at any moment does not bring it down, and what it says next is of the files as they are', async () => {
    const folder = benchCopy();
    const file = 'valve.pairing.json';
    const csv = join(folder, 'valve.csv');
    const bytes = readFileSync(csv);
    const deaths: string[] = [];
    const script = join(project, 'dist', 'worker.js');
    const worker = new WorkerClient(
      () => nodeWorker(script),
      noHostFiles,
      (why) => deaths.push(why),
    );
    client = worker;
    const notices: FromWorker[] = [];
    let onNotice = () => {};
    worker.join('one', {
      hear(notice) {
        notices.push(notice);
        onNotice();
      },
      lost: () => {},
    });
    const text = readFileSync(join(folder, file), 'utf8');
    let generation = 0;
    /** Computes until the figures are there, and stops then: the choice takes long. */
    const compute = async (changeAfter: number, change: () => void) => {
      notices.length = 0;
      onNotice = () => {
        if (notices.length === changeAfter) change();
        const last = notices.at(-1);
        if (last?.type === 'part' && last.part === 'firmware' && !last.failed)
          void worker.call.stop({ session: 'one' });
      };
      await worker.call.update({
        session: 'one',
        generation: ++generation,
        root: { kind: 'local', folder },
        place: { file, folder: '' },
        text,
      });
    };
    const codes = () =>
      notices
        .flatMap((notice) => (notice.type === 'part' && notice.part === 'suitability' ? [notice.view] : []))
        .flatMap((view) => (view ? unpack<Views['suitability']>(view).findings : []))
        .map(({ code }) => code);

    await compute(3, () => truncateSync(csv, 20_000));
    await compute(0, () => {});
    const shorter = codes();
    await compute(2, () => rmSync(csv));
    await compute(0, () => {});
    const gone = codes();
    writeFileSync(`${csv}.new`, bytes);
    await compute(1, () => renameSync(`${csv}.new`, csv));
    await compute(0, () => {});
    const files = await worker.call.files({ session: 'one', generation });
    expect(deaths).toEqual([]);
    expect([shorter, gone]).toEqual([
      expect.arrayContaining(['interval-past-end']),
      expect.arrayContaining(['missing-file']),
    ]);
    expect(files?.length).toBeGreaterThan(3);
    expect(tapwright(folder, 'design', file).status).toBe(0);
  });
});

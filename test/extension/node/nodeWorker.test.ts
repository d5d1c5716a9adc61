import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import type { FromWorker } from '../../../core/protocol/messages';
import { nodeWorker } from '../../../extension/node/nodeWorker';
import { writeFiles } from '../../../extension/node/writeFiles';
import { WorkerClient } from '../../../extension/workerClient';
import { benchCopy, emptyFolder, project, tapwright } from '../../support/cli';
import { noHostFiles } from '../../support/noHostFiles';

// The bundled worker in a thread, over the same port as in a Node host. `npm test` builds it first.

let client: WorkerClient | null = null;
afterEach(() => client?.dispose());

function newClient(script: string, died: (why: string) => void = () => {}): WorkerClient {
  client = new WorkerClient(() => nodeWorker(script), noHostFiles, died);
  return client;
}

describe('the worker on a Node host', () => {
  it('makes the files that the command line writes, byte for byte', async () => {
    const [byEditor, byCommand] = [benchCopy(), benchCopy()];
    const file = 'valve.pairing.json';
    const worker = newClient(join(project, 'dist', 'worker.js'));
    const parts = new Set<string>();
    const there = new Promise<void>((resolve) => {
      worker.join('one', {
        hear(notice: FromWorker) {
          if (notice.type !== 'part') return;
          parts.add(notice.part);
          if (notice.part === 'firmware') resolve();
        },
        lost: () => {},
      });
    });
    const text = readFileSync(join(byEditor, file), 'utf8');
    const root = { kind: 'local', folder: byEditor } as const;
    const updated = worker.call
      .update({ session: 'one', generation: 1, root, place: { file, folder: '' }, text })
      .catch(() => {});
    await there;
    expect([...parts]).toEqual(expect.arrayContaining(['recordings', 'figures', 'evidence']));
    const files = await worker.call.files({ session: 'one', generation: 1 });
    expect(await worker.call.files({ session: 'one', generation: 2 })).toBeNull();
    await worker.call.stop({ session: 'one' });
    await updated;
    expect((await writeFiles(byEditor, byEditor, files!)).findings).toEqual([]);

    expect(tapwright(byCommand, 'design', file).status).toBe(0);
    expect(files!.length).toBeGreaterThan(3);
    for (const { path } of files!) {
      const [ours, theirs] = [byEditor, byCommand].map((folder) => readFileSync(join(folder, path)));
      expect(ours.equals(theirs), path).toBe(true);
    }
  });

  it('is found dead where it throws, with the reason', async () => {
    const script = join(emptyFolder(), 'worker.js');
    writeFileSync(script, "setTimeout(() => { throw new Error('out of luck'); }, 20);");
    const died = new Promise<string>((resolve) => newClient(script, resolve));
    await expect(client!.call.stop({ session: 'one' })).rejects.toThrow('out of luck');
    expect(await died).toContain('out of luck');
  });

  it('is not found dead where it was ended', async () => {
    const script = join(emptyFolder(), 'worker.js');
    writeFileSync(script, 'setTimeout(() => {}, 60_000);');
    let deaths = 0;
    const waits = newClient(script, () => deaths++).call.stop({ session: 'one' });
    client!.dispose();
    await expect(waits).rejects.toThrow('ended');
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect(deaths).toBe(0);
  });
});

import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import type { ToPage } from '../../../core/protocol/messages';
import { Session } from '../../../extension/editors/session';
import { nodeWorker } from '../../../extension/node/nodeWorker';
import type { WorkerPort } from '../../../extension/platform';
import { WorkerClient } from '../../../extension/workerClient';
import { project, snapshot } from '../../support/cli';
import { noHostFiles } from '../../support/noHostFiles';
import { patience, small, smallPairing } from './smallPairing';

// The bundled worker in a real thread that runs out of memory or is ended, with the session that a page hears.

let client: WorkerClient | null = null;
afterEach(() => client?.dispose());

/** An editor's session without its editor. */
function newEditor(folder: string, maxOldGenerationSizeMb: number) {
  const started: WorkerPort[] = [];
  const heard: ToPage[] = [];
  const deaths: string[] = [];
  const script = join(project, 'dist', 'worker.js');
  const worker = new WorkerClient(
    () => {
      const port = nodeWorker(script, { maxOldGenerationSizeMb, maxYoungGenerationSizeMb: 8 });
      started.push(port);
      return port;
    },
    noHostFiles,
    (why) => deaths.push(why),
  );
  client = worker;
  let text = readFileSync(join(folder, small), 'utf8');
  const session = new Session({
    begin: (generation) =>
      worker.call.update({
        session: 'one',
        generation,
        root: { kind: 'local', folder },
        place: { file: small, folder: '' },
        text,
      }),
    wordsFor: (kind, why) => `${kind}: ${why}`,
    showBusy: () => {},
  });
  worker.join('one', session);
  session.addPage((notice) => heard.push(notice));
  return {
    started,
    heard,
    deaths,
    worker,
    /** What the page was told of trouble; null: that it is over. */
    troubles: () => heard.flatMap((notice) => (notice.type === 'trouble' ? [notice.text] : [])),
    /** Computes a text and waits until the page hears that it is over. */
    async compute(next: string) {
      text = next;
      heard.length = 0;
      session.advance();
      session.run();
      await expect.poll(() => heard.at(-1)?.type === 'idle', { timeout: 50_000, interval: 20 }).toBe(true);
      return heard.at(-1);
    },
    shows: () => heard.some((notice) => notice.type === 'part' && notice.part === 'firmware' && notice.view),
    session,
  };
}

/** The document with a key that nobody knows, whose lists take more memory than the worker has. */
const huge = (text: string) => `${text.slice(0, -1)}, "x": [${'[0],'.repeat(400_000)}[0]]}`;

describe('a worker that runs out of memory', { timeout: patience }, () => {
  it('is started again once, then the page is told to change something, and all goes on after that', async () => {
    const folder = smallPairing();
    const before = snapshot(folder);
    const text = readFileSync(join(folder, small), 'utf8');
    const editor = newEditor(folder, 48);
    await editor.compute(text);
    expect([editor.shows(), editor.troubles(), editor.started.length]).toEqual([true, [], 1]);

    const last = await editor.compute(huge(text));
    expect(last).toMatchObject({ type: 'idle', stopped: true });
    expect(editor.troubles()).toEqual([
      expect.stringMatching(/^restarted: .*memory/),
      expect.stringMatching(/^lost: .*memory/),
    ]);
    expect([editor.started.length, editor.deaths.length]).toEqual([2, 2]);
    // Nothing that waits is left without an answer, and there is nothing to write.
    expect(
      await editor.worker.call.files({ session: 'one', generation: editor.session.generation }),
    ).toBeNull();

    const good = await editor.compute(text);
    expect(good).toMatchObject({ type: 'idle', stopped: false });
    expect([editor.shows(), editor.troubles()]).toEqual([true, [null]]);
    expect(snapshot(folder)).toEqual(before);
  });
});

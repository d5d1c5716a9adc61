import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { newPace } from '../../../core/pace';
import { check } from '../../../core/pipeline/check';
import { writeAll } from '../../../extension/files/writeAll';
import { nodeDisk } from '../../../extension/node/nodeDisk';
import { newNodeHost } from '../../../extension/node/nodeHost';
import { project, snapshot, tapwright } from '../../support/cli';
import { leftovers, patience, small, smallDocument, smallPairing, withFault } from './smallPairing';

// Two writers on one document at the same time: one comes whole between two steps of the other, which is the worst that
// can happen, since each file is put in place by one step.

const written = (folder: string) => join(folder, 'generated');

/** Both documents' files, and the folder as the first leaves it. */
function bothDesigns() {
  const folder = smallPairing();
  const design = (length: number) => {
    writeFileSync(join(folder, small), smallDocument(length));
    expect(tapwright(folder, 'design', small).status).toBe(0);
    return snapshot(written(folder));
  };
  const newer = design(12);
  return { folder, older: design(8), newer };
}

/** Each file is one writer's or the other's; where they are mixed, the check of either document says so. */
async function expectWholeOrTold(
  folder: string,
  older: Record<string, string>,
  newer: Record<string, string>,
): Promise<boolean> {
  const now = snapshot(written(folder));
  expect(leftovers(folder)).toEqual([]);
  expect(Object.keys(now)).toEqual(Object.keys(newer));
  for (const [name, bytes] of Object.entries(now)) expect([older[name], newer[name]], name).toContain(bytes);
  const isOne = (of: Record<string, string>) =>
    Object.entries(now).every(([name, bytes]) => bytes === of[name]);
  for (const [length, whole] of [
    [8, isOne(older)],
    [12, isOne(newer)],
  ] as const) {
    const host = newNodeHost(folder, newPace());
    const { state } = await check(host, smallDocument(length), { file: small, folder: '' });
    await host.close();
    expect(state, `length ${length}`).toBe(whole ? 'current' : 'failed');
  }
  return !isOne(older) && !isOne(newer);
}

describe('two windows on one document', { timeout: patience }, () => {
  it('two runs of the command line leave whole sets or one that is told', async () => {
    const { folder, older, newer } = bothDesigns();
    const cli = join(project, 'dist', 'cli.js');
    // The later run has the changed document. It comes after two renames of the earlier, and before its last;
    // each file takes six calls before its rename.
    const changed = Object.keys(newer).filter((name) => newer[name] !== older[name]).length;
    const run = `
      const { writeFileSync } = require('node:fs');
      writeFileSync(${JSON.stringify(join(folder, small))}, ${JSON.stringify(smallDocument(12))});
      const { status } = require('node:child_process').spawnSync(
        process.execPath, [${JSON.stringify(cli)}, 'design', '${small}'], { cwd: ${JSON.stringify(folder)} });
      process.exitCode = status;`;
    let mixed = 0;
    for (const at of [6 * changed + 3, 7 * changed]) {
      writeFileSync(join(folder, small), smallDocument(10));
      expect(tapwright(folder, 'design', small).status).toBe(0);
      writeFileSync(join(folder, small), smallDocument(8));
      const { status, err } = withFault(folder, { of: 'writes', at, run }, 'design', small);
      expect([status, err]).toEqual([0, expect.not.stringContaining('error')]);
      if (await expectWholeOrTold(folder, older, newer)) mixed++;
      expect(readFileSync(join(folder, small), 'utf8')).toBe(smallDocument(12));
    }
    expect(mixed).toBe(2);
    expect(tapwright(folder, 'design', small).status).toBe(0);
    expect(snapshot(written(folder))).toEqual(newer);
  });

  it('the editor and another window leave whole sets or one that is told, whatever step is between', async () => {
    const { folder, older, newer } = bothDesigns();
    const last = 'case.taps.json';
    const filesOf = (set: Record<string, string>) =>
      [...Object.keys(set).filter((name) => name !== last), last].map((name) => ({
        path: `generated/${name}`,
        bytes: new Uint8Array(Buffer.from(set[name], 'base64')),
      }));
    let [mixed, steps] = [0, 1];
    for (let at = 1; at <= steps; at++) {
      await writeAll(nodeDisk(folder, folder), filesOf(older));
      const disk = nodeDisk(folder, folder);
      steps = 0;
      const other = async () => {
        if (++steps === at) await writeAll(nodeDisk(folder, folder), filesOf(older));
      };
      const between: typeof disk = {
        ...disk,
        async write(path, bytes) {
          await other();
          return disk.write(path, bytes);
        },
        async rename(from, to) {
          await other();
          return disk.rename(from, to);
        },
      };
      expect((await writeAll(between, filesOf(newer))).findings).toEqual([]);
      if (await expectWholeOrTold(folder, older, newer)) mixed++;
    }
    const changed = Object.keys(newer).filter((name) => newer[name] !== older[name]);
    // Mixed whenever some files were in place already.
    expect([steps, mixed]).toEqual([2 * changed.length, changed.length - 1]);
  });
});

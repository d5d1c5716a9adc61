import { expect } from 'vitest';
import { designByCommandLine } from '../support/commandLine';
import type { Flow } from '../support/flows';
import { heldOutShown, waitForHeldOut } from '../support/heldOut';
import { titleOf } from '../support/manifest';
import { until } from '../support/until';
import type { Workbench } from '../support/workbench';
import { openBelt } from './form';

/** Every file of the command line is there with the same bytes, and no other. */
function expectSameFiles(workbench: Workbench): void {
  const { files } = designByCommandLine(workbench.files, 'belt.pairing.json');
  expect(workbench.files.list('generated')).toEqual([...files.keys()].sort());
  for (const [path, bytes] of files) {
    expect(Buffer.compare(Buffer.from(workbench.files.bytes(path)), bytes), path).toBe(0);
  }
}

/** The taps file is written last. */
const written = (workbench: Workbench) => () => workbench.files.exists('generated/belt.taps.json');

/** Files land in the workspace as the command line would write them. */
export function writingFlows(flow: Flow): void {
  flow('writes the files that the command line writes, byte for byte', async (workbench) => {
    const page = await openBelt(workbench);
    await page.type('Length', '24');
    await until('the document changed', () => workbench.isDirty());
    await workbench.save();
    await waitForHeldOut(page, designByCommandLine(workbench.files, 'belt.pairing.json').heldOutDb);
    await page.button('Write files').click();
    await until('the files', written(workbench));
    expectSameFiles(workbench);
    // Where they went stays in sight once they have been read again, and goes with the next change.
    const outcome = page.inner.locator('[data-outcome]');
    await until('that they match', async () => (await page.text()).includes('files written match'));
    await until('nothing left to compute', async () => !(await page.isBusy()), 60_000);
    expect(await outcome.isVisible()).toBe(true);
    await page.type('Length', '16');
    await until('the outcome gone', async () => !(await outcome.isVisible()));
    await workbench.explorer.waitFor('generated');
  });

  flow('writes by command, and again only what changed', async (workbench) => {
    const page = await openBelt(workbench);
    await workbench.palette.run(titleOf('tapwright.writeFiles'));
    await until('the files', written(workbench));
    expectSameFiles(workbench);
    const first = workbench.files.bytes('generated/belt.taps.json');
    await page.type('Length', '8');
    await until('the document changed', () => workbench.isDirty());
    await workbench.save();
    await waitForHeldOut(page, designByCommandLine(workbench.files, 'belt.pairing.json').heldOutDb);
    await page.button('Write files').click();
    await until('other files', () => {
      const now = workbench.files.bytes('generated/belt.taps.json');
      return Buffer.compare(Buffer.from(now), Buffer.from(first)) !== 0;
    });
    expectSameFiles(workbench);
  });

  flow('drags the end of an interval into the document', async (workbench) => {
    const page = await openBelt(workbench);
    const before = JSON.parse(workbench.files.read('belt.pairing.json'));
    const figure = await heldOutShown(page);
    const handle = page
      .section('Recordings')
      .getByRole('slider', { name: /^end of fit/i })
      .first();
    await handle.scrollIntoViewIfNeeded();
    const box = await until('the end of the fit', () => handle.boundingBox());
    const { mouse } = workbench.page;
    const y = box.y + box.height / 2;
    await mouse.move(box.x + box.width / 2, y);
    await mouse.down();
    for (let step = 1; step <= 10; step++) await mouse.move(box.x + box.width / 2 - 12 * step, y);
    await mouse.up();
    await until('the document changed', () => workbench.isDirty());
    await workbench.save();
    const after = JSON.parse(workbench.files.read('belt.pairing.json'));
    expect(after.takes[0].fit.to).toBeLessThan(before.takes[0].fit.to);
    expect(after.takes[0].fit.from).toBe(before.takes[0].fit.from);
    expect({ ...after, takes: after.takes.slice(1) }).toEqual({ ...before, takes: before.takes.slice(1) });
    await waitForHeldOut(page, designByCommandLine(workbench.files, 'belt.pairing.json').heldOutDb);
    expect(figure).not.toBeNull();
  });
}

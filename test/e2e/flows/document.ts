import { expect } from 'vitest';
import type { Flow } from '../support/flows';
import { heldOutShown, waitForHeldOut } from '../support/heldOut';
import { titleOf } from '../support/manifest';
import { until } from '../support/until';
import { openBelt } from './form';

/** The same document as text, and as another program leaves it. */
export function documentFlows(flow: Flow): void {
  flow(
    'says where broken JSON is broken, keeps the last good view, and goes on once it is mended',
    async (workbench) => {
      const page = await openBelt(workbench);
      const before = (await heldOutShown(page)) as number;
      await workbench.palette.run(titleOf('tapwright.openAsText'));
      await until('the text', () => workbench.text.isThere());
      await workbench.text.typeAt('end', '}');
      await until('the document changed', () => workbench.isDirty());
      await workbench.palette.run(titleOf('tapwright.openPage'));
      await until('the page', () => page.isThere());
      await until('where it is broken', async () => {
        return /line 5\d/i.test(await page.text());
      });
      await waitForHeldOut(page, before);
      await workbench.palette.run(titleOf('tapwright.openAsText'));
      await until('the text', () => workbench.text.isThere());
      await workbench.text.focus();
      await workbench.page.keyboard.press('Control+End');
      await workbench.page.keyboard.press('Backspace');
      await workbench.save();
      await workbench.palette.run(titleOf('tapwright.openPage'));
      await until('the page', () => page.isThere());
      await waitForHeldOut(page, before);
      await page.type('Length', '8');
      await until('another figure', async () => {
        const now = await heldOutShown(page);
        return now !== null && now > before + 1;
      });
    },
  );

  flow('follows a document that changes on disk', async (workbench) => {
    const page = await openBelt(workbench);
    const before = (await heldOutShown(page)) as number;
    const text = workbench.files.read('belt.pairing.json').replace('"length": 64', '"length": 8');
    workbench.files.write('belt.pairing.json', text);
    await until('the length from disk', async () => (await page.field('Length').inputValue()) === '8');
    await until('another figure', async () => {
      const now = await heldOutShown(page);
      return now !== null && now > before + 1;
    });
    expect(await workbench.isDirty()).toBe(false);
  });

  flow('finds a recording that changes on disk', async (workbench) => {
    const page = await openBelt(workbench);
    const before = (await heldOutShown(page)) as number;
    // The load cell of the slow take gets the medium take's: nothing there can be cancelled any more.
    workbench.files.write(
      'slow.csv',
      swapped(workbench.files.read('slow.csv'), workbench.files.read('medium.csv')),
    );
    await until('another figure', async () => {
      const now = await heldOutShown(page);
      return now !== null && now > before + 3;
    });
  });
}

/** The first file with the last column of the second. */
function swapped(first: string, second: string): string {
  const cells = second.split('\n').map((line) => line.slice(line.lastIndexOf(',') + 1));
  return first
    .split('\n')
    .map((line, i) => (line === '' ? line : `${line.slice(0, line.lastIndexOf(',') + 1)}${cells[i]}`))
    .join('\n');
}

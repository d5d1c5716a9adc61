import { expect } from 'vitest';
import { designByCommandLine } from '../support/commandLine';
import type { Flow } from '../support/flows';
import { heldOutShown, waitForHeldOut } from '../support/heldOut';
import type { PageFrame } from '../support/pageFrame';
import { until } from '../support/until';
import type { Workbench } from '../support/workbench';

/** Opens the belt's pairing and waits for its figure. */
export async function openBelt(workbench: Workbench): Promise<PageFrame> {
  const page = await workbench.openPage('belt.pairing.json');
  await until('a held-out figure in the strip', async () => (await heldOutShown(page)) !== null);
  return page;
}

/** Saves, then waits for the figure that the command line finds for the same document. */
async function agreesWithCommandLine(workbench: Workbench, page: PageFrame): Promise<number> {
  await workbench.save();
  const { heldOutDb } = designByCommandLine(workbench.files, 'belt.pairing.json');
  await waitForHeldOut(page, heldOutDb);
  return heldOutDb;
}

const filterOf = (workbench: Workbench) => JSON.parse(workbench.files.read('belt.pairing.json')).filter;

/** The form changes the document, and the figures follow. */
export function formFlows(flow: Flow): void {
  flow('opens a pairing', async (workbench) => {
    const page = await openBelt(workbench);
    expect(await workbench.isDirty()).toBe(false);
    await waitForHeldOut(page, designByCommandLine(workbench.files, 'belt.pairing.json').heldOutDb);
    for (const heading of ['Recordings', 'Suitability', 'Design', 'Evidence', 'Firmware']) {
      await until(`the section ${heading}`, () => page.section(heading).isVisible());
    }
    expect(await page.field('Length').inputValue()).toBe('64');
    expect(await page.field('Delay').inputValue()).toBe('0');
  });

  flow('shows the held-out figure of a changed length, delay and regularisation', async (workbench) => {
    const page = await openBelt(workbench);
    const before = await heldOutShown(page);
    await page.type('Length', '8');
    await until('the document changed', () => workbench.isDirty());
    const shorter = await agreesWithCommandLine(workbench, page);
    expect(shorter).toBeGreaterThan((before as number) + 1);
    await page.type('Delay', '4');
    const later = await agreesWithCommandLine(workbench, page);
    expect(later).not.toBe(shorter);
    // A decimal comma, and ten times the power of the inputs: hardly anything is taken off.
    await page.type('Regularisation', '10,5');
    const damped = await agreesWithCommandLine(workbench, page);
    expect(damped).toBeGreaterThan(later + 1);
    expect(filterOf(workbench)).toMatchObject({ length: 8, delay: 4, regularisation: 10.5 });
  });

  flow('changes nothing in the document but what was changed in the form', async (workbench) => {
    const before = workbench.files.read('belt.pairing.json');
    const page = await openBelt(workbench);
    await page.type('Length', '48');
    await until('the document changed', () => workbench.isDirty());
    await workbench.save();
    expect(workbench.files.read('belt.pairing.json')).toBe(before.replace('"length": 64', '"length": 48'));
  });

  flow('undoes and redoes', async (workbench) => {
    const page = await openBelt(workbench);
    const first = (await heldOutShown(page)) as number;
    await page.type('Length', '8');
    await until('another figure', async () => {
      const now = await heldOutShown(page);
      return now !== null && now > first + 1;
    });
    const second = (await heldOutShown(page)) as number;
    await workbench.undo();
    await waitForHeldOut(page, first);
    await until('the old length', async () => (await page.field('Length').inputValue()) === '64');
    expect(await workbench.isDirty()).toBe(false);
    await workbench.redo();
    await waitForHeldOut(page, second);
    await until('the new length', async () => (await page.field('Length').inputValue()) === '8');
  });

  flow('keeps what is being typed while the figures of the change before it come', async (workbench) => {
    const page = await openBelt(workbench);
    await until('nothing left to compute', async () => !(await page.isBusy()), 60_000);
    const end = page
      .section('Recordings')
      .getByRole('slider', { name: /^end of fit/i })
      .first();
    await page.field('Fit to').click({ clickCount: 3 });
    await workbench.page.keyboard.type('6');
    await workbench.page.keyboard.press('Enter');
    await page.field('Held-out to').click({ clickCount: 3 });
    await workbench.page.keyboard.type('2');
    await until('the shorter fit in the plot', async () => {
      return /^6(\.0*)?\D*$/.test((await end.getAttribute('aria-valuetext')) ?? '');
    });
    await until('nothing left to compute', async () => !(await page.isBusy()), 60_000);
    await workbench.page.keyboard.type('3');
    expect(await page.field('Held-out to').inputValue()).toBe('23');
    await workbench.page.keyboard.press('Enter');
    await workbench.save();
    const [take] = JSON.parse(workbench.files.read('belt.pairing.json')).takes;
    expect([take.fit.to, take.heldOut.to]).toEqual([6, 23]);
  });

  flow('leaves the focus on the take that was chosen', async (workbench) => {
    const page = await openBelt(workbench);
    await page.button('medium belt').focus();
    await workbench.page.keyboard.press('Enter');
    await until('the other take', async () => {
      return (await page.field('Name of the take').inputValue()) === 'medium belt';
    });
    expect(await page.hasFocus(page.button('medium belt'))).toBe(true);
  });

  flow('marks a wrong value at its field and keeps the last good result', async (workbench) => {
    const page = await openBelt(workbench);
    const before = (await heldOutShown(page)) as number;
    await page.type('Length', 'many');
    await until('the mark', async () => (await page.field('Length').getAttribute('aria-invalid')) === 'true');
    expect(await heldOutShown(page)).toBe(before);
    expect(await workbench.isDirty()).toBe(false);
  });
}

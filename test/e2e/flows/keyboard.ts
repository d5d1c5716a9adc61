import { expect } from 'vitest';
import type { Flow } from '../support/flows';
import { heldOutShown } from '../support/heldOut';
import { until } from '../support/until';
import type { Workbench } from '../support/workbench';
import { openBelt } from './form';

/** Presses Tab until the field or button with this label has the focus; how often it took. */
async function tabTo(workbench: Workbench, label: string): Promise<number> {
  const target = workbench.frame.inner.getByLabel(label, { exact: true }).or(workbench.frame.button(label));
  for (let presses = 0; presses < 200; presses++) {
    if (await workbench.frame.hasFocus(target)) return presses;
    await workbench.page.keyboard.press('Tab');
  }
  throw new Error(`200 times Tab did not lead to ${label}`);
}

/** No pointer from opening the file to the written files. */
export function keyboardFlows(flow: Flow): void {
  flow('can be used with the keyboard alone', async (workbench) => {
    const page = await openBelt(workbench);
    const before = (await heldOutShown(page)) as number;
    // Quick open leaves the focus in the page.
    await tabTo(workbench, 'Length');
    expect(await page.focusIsVisible()).toBe(true);
    // The Tab key selects what is in the field.
    await workbench.page.keyboard.type('8');
    await workbench.page.keyboard.press('Enter');
    await until('another figure', async () => {
      const now = await heldOutShown(page);
      return now !== null && now > before + 1;
    });
    await workbench.page.keyboard.press('Control+s');
    await until('the file saved', async () => !(await workbench.isDirty()));
    expect(workbench.files.read('belt.pairing.json')).toContain('"length": 8');
    for (let i = 0; i < 200 && !(await page.hasFocus(page.button('Write files'))); i++) {
      await workbench.page.keyboard.press('Shift+Tab');
    }
    expect(await page.focusIsVisible()).toBe(true);
    await workbench.page.keyboard.press('Enter');
    await until('the files', () => workbench.files.exists('generated/belt.taps.json'));
  });
}

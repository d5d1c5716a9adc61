import { expect } from 'vitest';
import type { Flow } from '../support/flows';
import { heldOutShown } from '../support/heldOut';
import { menuTitleOf, walkthrough } from '../support/manifest';
import { until } from '../support/until';

/** The walkthrough; in a workbench where nothing was done before, since its steps remember what was. */
export function walkthroughFlows(flow: Flow): void {
  flow('walks from the sample bench to written files', async (workbench) => {
    const { title, steps } = walkthrough();
    const { page, palette, frame } = workbench;
    await palette.run('Welcome: Open Walkthrough...');
    await palette.choose(title);
    const step = (name: string) => page.locator('.getting-started-step', { hasText: name });
    const isDone = (name: string) =>
      until(`a tick at ${name}`, async () => (await step(name).locator('.complete').count()) > 0);
    await until('the steps', async () => (await page.locator('.getting-started-step').count()) === 4);
    expect(await page.locator('.getting-started-step .complete').count()).toBe(0);
    await step(steps.open)
      .getByRole('button', { name: menuTitleOf('tapwright.openSampleBench') })
      .click();
    await palette.press('OK');
    const copied = 'tapwright-bench/belt.pairing.json';
    await until('its tab', async () => (await workbench.activeTab())?.startsWith('belt.pairing.json'));
    await until('its page', () => frame.isThere());
    await until('its figure', async () => (await heldOutShown(frame)) !== null);
    expect(workbench.files.read(copied)).toBe(workbench.files.read('belt.pairing.json'));
    expect(workbench.files.bytes('tapwright-bench/tubing.wav')).toEqual(workbench.files.bytes('tubing.wav'));

    await frame.type('Length', '16');
    await until('the document changed', () => workbench.isDirty());
    await frame.button('Write files').click();
    await until('the files', () => workbench.files.exists('tapwright-bench/generated/belt.taps.json'));
    await page.locator('.tab', { hasText: 'Welcome' }).click();
    await step(steps.inspect).click();
    for (const name of Object.values(steps)) await isDone(name);
    await workbench.screenshot('walkthrough');
    // Quick open would offer the copy, which is gone, to the flows that follow.
    await palette.run('View: Close All Editors');
    await palette.run('Clear Editor History');
    await page.locator('.monaco-dialog-box').getByRole('button', { name: 'Clear', exact: true }).click();
  });
}

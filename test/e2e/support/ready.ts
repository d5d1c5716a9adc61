import type { Page } from 'playwright-core';
import type { Palette } from './palette';
import { until } from './until';

/**
 * Waits until the workbench can open a custom editor: its service is created in an idle moment after the extension is
 * registered, and a file opened before opens as text.
 * @param command title of one of the extension's commands
 */
export async function ready(page: Page, palette: Palette, command: string): Promise<void> {
  await until('the workbench', () => page.locator('.monaco-workbench').isVisible(), 60_000);
  await until(`${command} in the palette`, () => palette.offers(command), 60_000);
  await palette.dismiss();
  // The workbench's last phase of contributions; custom editors are among them.
  await page.waitForFunction(
    "performance.getEntriesByName('code/didCreateWorkbenchContributions/4').length > 0",
    undefined,
    { timeout: 60_000 },
  );
  await page.evaluate('new Promise((done) => requestIdleCallback(() => done(null), { timeout: 3000 }))');
}

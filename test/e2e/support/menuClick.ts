import type { Locator } from 'playwright-core';
import { until } from './until';

/** Clicks an entry of a menu until the menu is gone: one that has just been opened does not hear every click. */
export async function menuClick(item: Locator, what: string): Promise<void> {
  await until(`${what} in a menu`, async () => (await item.count()) > 0);
  await until(`${what} to be taken`, async () => {
    if ((await item.count()) === 0) return true;
    await item
      .first()
      .click({ timeout: 2000 })
      .catch(() => {});
    return item
      .first()
      .waitFor({ state: 'hidden', timeout: 500 })
      .then(
        () => true,
        () => false,
      );
  });
}

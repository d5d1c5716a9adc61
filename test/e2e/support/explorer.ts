import type { Locator, Page } from 'playwright-core';
import { menuClick } from './menuClick';
import { until } from './until';

/** The tree of files at the side. */
export class Explorer {
  private readonly tree: Locator;

  constructor(private readonly page: Page) {
    this.tree = page.locator('.explorer-folders-view');
  }

  row(name: string): Locator {
    return this.tree.locator(
      `.monaco-list-row[aria-label="${name}"], .monaco-list-row[aria-label^="${name},"]`,
    );
  }

  /** Waits until a file shows, or no longer does. */
  async waitFor(name: string, there = true): Promise<void> {
    await until(`${name} ${there ? 'in' : 'gone from'} the explorer`, async () => {
      return (await this.row(name).count()) > 0 === there;
    });
  }

  async open(name: string): Promise<void> {
    await this.waitFor(name);
    await this.row(name).dblclick();
  }

  /** Selects one or more files and clicks an entry of their context menu. */
  async contextMenu(names: readonly string[], entry: string): Promise<void> {
    await this.select(names);
    await this.row(names[names.length - 1]).click({ button: 'right' });
    const item = this.page.locator('.monaco-menu').getByRole('menuitem', { name: entry, exact: true });
    await menuClick(item, entry);
  }

  /** Entries of a file's context menu, then closes it. */
  async menuEntries(names: readonly string[]): Promise<string[]> {
    await this.select(names);
    await this.row(names[names.length - 1]).click({ button: 'right' });
    const items = this.page.locator('.monaco-menu').getByRole('menuitem');
    await until('the context menu', async () => (await items.count()) > 0);
    const labels = await items.allTextContents();
    await this.page.keyboard.press('Escape');
    return labels;
  }

  /** With the control key throughout, since a plain click would open the file as well. */
  private async select(names: readonly string[]): Promise<void> {
    for (const name of names) await this.waitFor(name);
    await this.page.keyboard.press('Escape');
    const rows = this.tree.locator('.monaco-list-row');
    for (let i = 0; i < (await rows.count()); i++) {
      const row = rows.nth(i);
      const name = (await row.locator('.label-name').textContent()) ?? '';
      const selected = (await row.getAttribute('aria-selected')) === 'true';
      if (selected !== names.includes(name)) await row.click({ modifiers: ['ControlOrMeta'] });
    }
  }
}

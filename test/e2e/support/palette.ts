import type { Locator, Page } from 'playwright-core';
import { until } from './until';

/** The quick input on top of the workbench: commands, files, and the pickers that extensions show. */
export class Palette {
  private readonly widget: Locator;
  private readonly input: Locator;

  constructor(private readonly page: Page) {
    this.widget = page.locator('.quick-input-widget');
    this.input = this.widget.locator('input[type="text"], input:not([type])').first();
  }

  async isOpen(): Promise<boolean> {
    return this.widget.isVisible();
  }

  /** Runs the command with exactly this title, category and all, as the palette shows it. */
  async run(title: string): Promise<void> {
    await this.pick(title, `>${title}`, 'F1');
  }

  /** True where the palette offers a command now. */
  async offers(title: string): Promise<boolean> {
    await this.show('F1');
    await this.input.fill(`>${title}`);
    return (await this.row(title).count()) > 0;
  }

  /** Quick open; clicks the row with exactly this label. */
  async openFile(name: string): Promise<void> {
    await this.pick(name, name, 'Control+p');
  }

  /** In a picker that is already open: types the label and clicks its row. */
  async choose(label: string): Promise<void> {
    await until('a picker', () => this.isOpen());
    await this.pick(label, label);
  }

  /** In an input box that is already open. */
  async answer(text: string): Promise<void> {
    await until('an input box', () => this.isOpen());
    await this.input.fill(text);
    await this.input.press('Enter');
  }

  /** In a picker that is already open: clicks a button of it. */
  async press(name: string): Promise<void> {
    const button = this.widget.getByRole('button', { name, exact: true });
    await until(`the button ${name}`, async () => (await button.count()) > 0);
    await button.first().click();
  }

  /** Labels of the rows that are to be seen. */
  async labels(): Promise<string[]> {
    return this.widget.locator('.monaco-list-row .label-name').allTextContents();
  }

  /** What the picker asks. */
  async question(): Promise<string> {
    const title = (await this.widget.locator('.quick-input-title').textContent()) ?? '';
    return `${title} ${(await this.input.getAttribute('placeholder')) ?? ''}`.trim();
  }

  async dismiss(): Promise<void> {
    await until('the palette gone', async () => {
      if (!(await this.isOpen())) return true;
      await this.page.keyboard.press('Escape');
      return false;
    });
  }

  private row(label: string): Locator {
    const exact = new RegExp(`^\\s*${label.replace(/[.*+?^${}()|[\]\\]/g, '\\$&')}\\s*$`);
    return this.widget.locator('.monaco-list-row').filter({
      has: this.page.locator('.label-name', { hasText: exact }),
    });
  }

  private async show(key: string): Promise<void> {
    await this.dismiss();
    await this.page.keyboard.press(key);
    // Pressed again where the workbench was too busy to hear it.
    await until('the palette', async () => {
      if (await this.appears()) return true;
      await this.page.keyboard.press(key);
      return this.appears();
    });
  }

  private appears(): Promise<boolean> {
    return this.widget.waitFor({ state: 'visible', timeout: 500 }).then(
      () => true,
      () => false,
    );
  }

  /**
   * The list follows the input late: the text is set again until the row is there. What takes the focus away, such as a
   * page that just opened, closes the palette: then it is shown again.
   * @param key shows the palette; none where a picker is open already
   */
  private async pick(label: string, typed: string, key?: string): Promise<void> {
    if (key !== undefined) await this.show(key);
    let asked = 0;
    await until(`${label} in the palette`, async () => {
      if (key !== undefined && !(await this.isOpen())) {
        await this.show(key);
        asked = 0;
      }
      if (asked++ % 20 === 0) await this.input.fill(typed, { timeout: 5000 });
      const row = this.row(label).first();
      if ((await row.count()) === 0) return false;
      await row.click({ timeout: 5000 });
      return true;
    });
  }
}

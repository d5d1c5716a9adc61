import type { Locator, Page } from 'playwright-core';
import { until } from './until';

/** The workbench's own text editor, in front. */
export class TextEditor {
  private readonly editor: Locator;

  constructor(private readonly page: Page) {
    this.editor = page.locator('.editor-group-container.active .editor-instance .monaco-editor').first();
  }

  async isThere(): Promise<boolean> {
    return this.editor.isVisible();
  }

  async focus(): Promise<void> {
    await this.editor.locator('.view-lines').click();
  }

  /** Replaces everything. */
  async replaceAll(text: string): Promise<void> {
    await this.focus();
    await this.page.keyboard.press('Control+a');
    await this.page.keyboard.insertText(text);
  }

  /** Types at the very start or end. */
  async typeAt(end: 'start' | 'end', text: string): Promise<void> {
    await this.focus();
    await this.page.keyboard.press(end === 'start' ? 'Control+Home' : 'Control+End');
    await this.page.keyboard.type(text);
  }

  /** Waits until the lines that are to be seen hold a text. */
  async shows(text: string): Promise<void> {
    await until(`${text} in the text editor`, async () => {
      // The editor draws spaces as non-breaking ones.
      const lines = (await this.editor.locator('.view-lines').textContent()) ?? '';
      return lines.replaceAll('\u00a0', ' ').includes(text);
    });
  }
}

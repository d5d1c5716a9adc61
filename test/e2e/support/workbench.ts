import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { BenchFolder } from './benchFolder';
import { Explorer } from './explorer';
import { PageFrame } from './pageFrame';
import { Palette } from './palette';
import { screenshots, workbenchBuild } from './places';
import { ready } from './ready';
import { startServer, type TestServer } from './server';
import { TextEditor } from './textEditor';
import { until } from './until';
import type { PageOptions } from './workbenchPage';

export interface WorkbenchOptions extends PageOptions {
  /** Where the extension's manifest lies. */
  extension: string;
  /** Full title of one of its commands: once the palette offers it the extension is there. */
  command: string;
}

/** A real workbench in a real browser on a copy of the sample bench, used as a user would. */
export class Workbench {
  readonly palette: Palette;
  readonly explorer: Explorer;
  readonly text: TextEditor;
  /** The page of the editor in front. */
  readonly frame: PageFrame;
  /** Errors and refusals that the browser reported, oldest first. */
  readonly complaints: string[] = [];

  private constructor(
    private readonly server: TestServer,
    private readonly context: BrowserContext,
    readonly page: Page,
    readonly files: BenchFolder,
  ) {
    this.palette = new Palette(page);
    this.explorer = new Explorer(page);
    this.text = new TextEditor(page);
    this.frame = new PageFrame(page);
    page.on('pageerror', (error) => this.complaints.push(`page error: ${error.message}`));
    page.on('console', (message) => {
      const { url } = message.location();
      // The workbench asks for translations of every manifest.
      if (message.type() !== 'error' || url.includes('/package.nls')) return;
      this.complaints.push(`${message.text()} ${url}`);
    });
  }

  /** Starts one and waits until a custom editor can be opened. */
  static async open(browser: Browser, options: WorkbenchOptions): Promise<Workbench> {
    const build = workbenchBuild();
    if (build === null) throw new Error('the web build of the workbench is not installed');
    const files = BenchFolder.ofSampleBench();
    const server = await startServer({ ...options, build, root: files.root });
    const context = await browser.newContext({
      viewport: { width: 1400, height: 1000 },
      reducedMotion: 'reduce',
      locale: 'en-US',
    });
    // The waiting is done by `until`, which says for what.
    context.setDefaultTimeout(20_000);
    const workbench = new Workbench(server, context, await context.newPage(), files);
    try {
      await workbench.page.goto(server.address, { timeout: 60_000 });
      await ready(workbench.page, workbench.palette, options.command);
    } catch (error) {
      await workbench.screenshot('failed-start');
      await workbench.close();
      throw new Error(`${error}\n${workbench.complaints.join('\n')}`);
    }
    return workbench;
  }

  async close(): Promise<void> {
    await this.context.close();
    await this.server.close();
    this.files.remove();
  }

  /** Opens a file by quick open, by whatever editor the workbench chooses for it. */
  async openFile(name: string): Promise<void> {
    await this.palette.openFile(name);
    await until(`the tab of ${name}`, async () => (await this.activeTab())?.startsWith(name));
  }

  /**
   * Opens a file whose page is to appear; returns once it has. The workbench may open it as text where it has not yet
   * created the service for custom editors, hence three times at most; the later ones from the explorer, since quick open
   * remembers the editor that a file was last seen in.
   */
  async openPage(name: string): Promise<PageFrame> {
    for (let attempt = 1; ; attempt++) {
      if (attempt === 1) await this.openFile(name);
      else await this.explorer.open(name);
      const kind = await until(`an editor of ${name}`, async () => {
        if (await this.frame.isThere()) return 'page';
        return (await this.text.isThere()) && 'text';
      });
      if (kind === 'page') return this.frame;
      if (attempt === 3) throw new Error(`${name} opened as text three times`);
      await this.closeEditor();
    }
  }

  /** Label of the tab in front; null where nothing is open. */
  async activeTab(): Promise<string | null> {
    const tab = this.page.locator('.editor-group-container.active .tab.active');
    return (await tab.count()) === 0 ? null : tab.first().getAttribute('aria-label');
  }

  async isDirty(): Promise<boolean> {
    return (await this.page.locator('.editor-group-container.active .tab.active.dirty').count()) > 0;
  }

  async save(): Promise<void> {
    await this.palette.run('File: Save');
    await until('the file saved', async () => !(await this.isDirty()));
  }

  /** Undo and redo of the editor in front, by the workbench's own menu commands. */
  async undo(): Promise<void> {
    await this.page.keyboard.press('Control+z');
  }

  async redo(): Promise<void> {
    await this.page.keyboard.press('Control+y');
  }

  /** Closes the editor in front and drops what was not saved. */
  async closeEditor(): Promise<void> {
    await this.palette.run('View: Revert and Close Editor');
  }

  /** Everything closed, nothing unsaved, and the files as the sample bench has them. */
  async reset(): Promise<void> {
    await this.page.keyboard.press('Escape');
    await until('every editor closed', async () => {
      if ((await this.activeTab()) === null) return true;
      await this.closeEditor();
      return false;
    });
    await this.palette.run('Notifications: Clear All Notifications');
    this.files.restore();
  }

  /** Chooses a theme by its label in the theme picker. */
  async switchTheme(label: string): Promise<void> {
    await this.palette.run('Preferences: Color Theme');
    await this.palette.choose(label);
    await until(`the theme ${label}`, async () => (await this.palette.isOpen()) === false);
  }

  /** Where a picture of that name goes. */
  pictureOf(name: string): string {
    mkdirSync(screenshots, { recursive: true });
    return join(screenshots, `${name}.png`);
  }

  /** Saves what is to be seen as `out/screenshots/NAME.png`. */
  async screenshot(name: string): Promise<string> {
    const path = this.pictureOf(name);
    await this.page.screenshot({ path });
    return path;
  }
}

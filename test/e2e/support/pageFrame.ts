import type { Frame, FrameLocator, Locator, Page } from 'playwright-core';
import { until } from './until';

/** The extension's page in the editor in front: a frame in a frame, made anew whenever the editor comes back. */
export class PageFrame {
  /** Found anew at each use. */
  readonly inner: FrameLocator;
  private readonly outer: Locator;

  constructor(private readonly page: Page) {
    this.outer = page.locator('iframe.webview.ready').filter({ visible: true });
    this.inner = this.outer.first().contentFrame().locator('iframe#active-frame').contentFrame();
  }

  async isThere(): Promise<boolean> {
    if ((await this.outer.count()) === 0) return false;
    return (await this.inner.locator('body > :not(script, style)').count()) > 0;
  }

  /** A field by its label. */
  field(label: string): Locator {
    return this.inner.getByLabel(label, { exact: true });
  }

  button(name: string): Locator {
    return this.inner.getByRole('button', { name, exact: true });
  }

  /** The section under a heading. */
  section(heading: string): Locator {
    return this.inner
      .locator('section')
      .filter({ has: this.page.getByRole('heading', { name: heading, exact: true }) });
  }

  /** The line on top that says the answer. */
  strip(): Locator {
    return this.inner.locator('[data-strip]');
  }

  /**
   * Sets a field as a user does: selects what is there, types, leaves the field. Not by Ctrl+A, which takes its way
   * through the workbench and may come after the first letters of so fast a typist.
   */
  async type(label: string, text: string): Promise<void> {
    const field = this.field(label);
    await field.click({ clickCount: 3 });
    await this.page.keyboard.type(text);
    await this.page.keyboard.press('Tab');
  }

  /** All that it says. */
  async text(): Promise<string> {
    return (await this.inner.locator('body').ariaSnapshot()).replace(/\s+/g, ' ');
  }

  /** True while a section is being computed or the strip's figures are out of date. */
  async isBusy(): Promise<boolean> {
    return (
      (await this.inner.locator('[aria-busy="true"], .stale, progress').filter({ visible: true }).count()) > 0
    );
  }

  /** `dark`, `light`, `hc-dark` or `hc-light`, as the workbench tells its pages. */
  async themeKind(): Promise<string> {
    const names = (await this.inner.locator('body').getAttribute('class')) ?? '';
    if (names.includes('vscode-high-contrast-light')) return 'hc-light';
    if (names.includes('vscode-high-contrast')) return 'hc-dark';
    return names.includes('vscode-light') ? 'light' : 'dark';
  }

  async hasFocus(target: Locator): Promise<boolean> {
    if ((await target.count()) !== 1) return false;
    // The toolkit's controls keep the focused element in a shadow root.
    return target.evaluate((element) => element.matches(':focus, :focus-within'));
  }

  /** True where the focused element draws an outline, a border or a shadow that it has not without focus. */
  async focusIsVisible(): Promise<boolean> {
    const frame = await this.handle();
    return (await frame.evaluate(focusScript)) as boolean;
  }

  /** The frame itself, for scripts such as axe-core. */
  async handle(): Promise<Frame> {
    return until('the page', async () => {
      const outer = await this.outer.first().elementHandle();
      const inner = await (await outer?.contentFrame())?.$('iframe#active-frame');
      return inner?.contentFrame();
    });
  }
}

const focusScript = `(() => {
  let element = document.activeElement;
  while (element.shadowRoot && element.shadowRoot.activeElement) element = element.shadowRoot.activeElement;
  const looks = (one) => {
    const { outlineStyle, outlineWidth, outlineColor, borderColor, boxShadow } = getComputedStyle(one);
    return outlineStyle === 'none' ? [borderColor, boxShadow].join() : [outlineWidth, outlineColor].join();
  };
  const chain = [element];
  while (chain.length < 4 && (chain[0].parentNode || chain[0].host)) {
    const above = chain[0].parentElement || chain[0].getRootNode().host;
    if (!above) break;
    chain.unshift(above);
  }
  const focused = chain.map(looks).join(';');
  element.blur();
  const plain = chain.map(looks).join(';');
  element.focus({ focusVisible: true });
  return focused !== plain;
})()`;

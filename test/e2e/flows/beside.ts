import { createHash } from 'node:crypto';
import { rmSync } from 'node:fs';
import { join } from 'node:path';
import type { Locator } from 'playwright-core';
import { expect } from 'vitest';
import { designByCommandLine } from '../support/commandLine';
import type { Flow } from '../support/flows';
import { titleOf } from '../support/manifest';
import { menuClick } from '../support/menuClick';
import { until } from '../support/until';
import type { Workbench } from '../support/workbench';

const header = 'generated/belt_taps.h';
const tapsFile = 'generated/belt.taps.json';
const program = '#include "generated/belt_taps.h"\n\nshort first(void) { return belt_taps[0]; }\n';
const rustProgram = 'mod belt_taps;\n\nfn first() -> i16 { belt_taps::TAPS[0][0] }\n';

/** Writes the belt's files as the command line does, and opens the header once its line says that it is current. */
async function openCurrentHeader(workbench: Workbench): Promise<void> {
  for (const [path, bytes] of designByCommandLine(workbench.files, 'belt.pairing.json').files) {
    workbench.files.write(path, bytes);
  }
  await workbench.openFile('belt_taps.h');
  await standing(workbench, 'current');
}

/** The words of the line above the array. */
const lens = (workbench: Workbench): Locator => workbench.page.locator('.codelens-decoration');

async function standing(workbench: Workbench, words: string): Promise<void> {
  await workbench.page.keyboard.press('Control+Home');
  await showArray(workbench);
  await until(`${words} above the array`, async () => {
    const told = (await lens(workbench).allTextContents()).join(' ').replaceAll('\u00a0', ' ');
    return told.includes(words);
  });
}

/** Scrolls to the array's line. */
async function showArray(workbench: Workbench): Promise<void> {
  const lines = workbench.files.read(header).split('\n');
  const line = 1 + lines.findIndex((one) => one.startsWith('static const'));
  await workbench.page.keyboard.press('Control+g');
  await workbench.palette.answer(`:${line}`);
}

/** Texts of the Problems view. */
async function problems(workbench: Workbench): Promise<string[]> {
  const panel = workbench.page.locator('.markers-panel');
  if (!(await panel.isVisible())) await workbench.page.keyboard.press('Control+Shift+m');
  return panel.locator('.monaco-list-row').allTextContents();
}

const hasProblem = (workbench: Workbench, text: string) =>
  until(`the problem: ${text}`, async () => (await problems(workbench)).some((row) => row.includes(text)));

const hasNone = (workbench: Workbench) =>
  until(
    'no problem',
    async () => (await problems(workbench)).every((row) => !row.includes('Tapwright')),
    90_000,
  );

/** Another recording of the same length: one digit differs. */
function changed(text: string): string {
  const at = text.search(/[1-8](?=\d*\n)/);
  return text.slice(0, at) + (text[at] === '5' ? '6' : '5') + text.slice(at + 1);
}

/** Taps as another solver would have written them: one is a little off, and all digests hold. */
function solvedOtherwise(taps: string): string {
  const [, before, first] = /("coefficients": \[\s*\[\s*)(-?[\d.e+-]+)/.exec(taps) ?? [];
  const open = '0'.repeat(64);
  const other = taps
    .replace(before + first, `${before}${Number(first) * 1.001}`)
    .replace(/"self": "[0-9a-f]{64}"/, `"self": "${open}"`);
  return other.replace(open, createHash('sha256').update(other).digest('hex'));
}

/** Middle of a word that is to be seen in the editor. */
async function placeOf(workbench: Workbench, word: string): Promise<{ x: number; y: number }> {
  const find = `(() => {
    const lines = document.querySelector('.editor-group-container.active .view-lines');
    if (lines === null) return null;
    const texts = document.createTreeWalker(lines, NodeFilter.SHOW_TEXT);
    for (let node = texts.nextNode(); node !== null; node = texts.nextNode()) {
      const at = (node.textContent ?? '').indexOf(${JSON.stringify(word)});
      if (at < 0) continue;
      const range = document.createRange();
      range.setStart(node, at);
      range.setEnd(node, at + ${word.length});
      const box = range.getBoundingClientRect();
      return { x: box.x + box.width / 2, y: box.y + box.height / 2 };
    }
    return null;
  })()`;
  return until(`the word ${word}`, () => workbench.page.evaluate<{ x: number; y: number } | null>(find));
}

/** The hover over a word, once it shows. */
async function hoverOver(workbench: Workbench, word: string): Promise<Locator> {
  const hover = workbench.page.locator('.monaco-hover:visible').filter({ hasText: 'Held-out NMSE' }).first();
  const { mouse } = workbench.page;
  await until(`a hover over ${word}`, async () => {
    const { x, y } = await placeOf(workbench, word);
    await mouse.move(x + 80, y + 60);
    await mouse.move(x, y, { steps: 4 });
    return hover.waitFor({ state: 'visible', timeout: 3000 }).then(() => true);
  });
  return hover;
}

/** What stands beside the code: hover, the line above the array, problems and what mends them. */
export function besideFlows(flow: Flow): void {
  flow('explains a generated name in any file that has it, with a picture', async (workbench) => {
    await openCurrentHeader(workbench);
    workbench.files.write('main.c', program);
    await workbench.explorer.waitFor('main.c');
    await workbench.openFile('main.c');
    const hover = await hoverOver(workbench, 'belt_taps');
    const text = (await hover.textContent()) ?? '';
    const { heldOutDb } = designByCommandLine(workbench.files, 'belt.pairing.json');
    expect(text).toContain(`${heldOutDb.toFixed(2)} dB`);
    expect(text).toContain('16-bit taps');
    expect(text).toContain('current');
    const picture = hover.locator('img');
    expect(await picture.getAttribute('src')).toMatch(/^data:image\/svg\+xml;base64,/);
    const drawn = "document.querySelector('.monaco-hover img[src^=data]').naturalWidth";
    await until('the picture drawn', async () => {
      const width = await workbench.page.evaluate(drawn);
      if (width !== 460) throw new Error(`its width is ${width}`);
      return true;
    });
    await workbench.screenshot('hover');
    await hover.getByText('belt.pairing.json').click();
    await until('the page', () => workbench.frame.isThere());

    // Taps whose pairing is gone explain themselves all the same, here in Rust.
    rmSync(join(workbench.files.path, 'belt.pairing.json'));
    workbench.files.write('main.rs', rustProgram);
    await workbench.explorer.waitFor('main.rs');
    await workbench.openFile('main.rs');
    await until('that the pairing is gone', async () => {
      const told = (await (await hoverOver(workbench, 'TAPS')).textContent()) ?? '';
      return told.includes('its pairing document is not in this workspace');
    });
  });

  flow('turns with a recording and back, and is mended by writing again', async (workbench) => {
    await openCurrentHeader(workbench);
    const recording = workbench.files.read('slow.csv');
    workbench.files.write('slow.csv', changed(recording));
    await standing(workbench, 'recording changed');
    await hasProblem(workbench, 'The recording slow.csv is not the one');
    await workbench.screenshot('problem');
    workbench.files.write('slow.csv', recording);
    await standing(workbench, 'current');
    await hasNone(workbench);

    workbench.files.write('slow.csv', changed(recording));
    await hasProblem(workbench, 'The recording slow.csv is not the one');
    await workbench.text.focus();
    await showArray(workbench);
    await workbench.page.keyboard.press('Control+.');
    // A click would meet the widget's own shield against clicks beside it.
    const fix = workbench.page.locator('.action-widget .monaco-list-row.focused', { hasText: 'Write Again' });
    await until('the quick fix', () => fix.first().isVisible());
    await workbench.page.keyboard.press('Enter');
    await hasNone(workbench);
    // The file has been replaced under its editor, which stays open.
    expect(await workbench.activeTab()).toMatch(/^belt_taps\.h/);
    await standing(workbench, 'current');
    const { files } = designByCommandLine(workbench.files, 'belt.pairing.json');
    expect(workbench.files.bytes(header)).toEqual(files.get(header));
  });

  flow('solves again when a pairing is saved, and as a task', async (workbench) => {
    await openCurrentHeader(workbench);
    const taps = workbench.files.read(tapsFile);
    const problem = 'solving again changes the taps';
    workbench.files.write('.vscode/settings.json', '{ "tapwright.check.onSave": true }');
    workbench.files.write(tapsFile, solvedOtherwise(taps));
    const text = workbench.files.read('belt.pairing.json');
    await workbench.openPage('belt.pairing.json');
    await workbench.palette.run(titleOf('tapwright.openAsText'));
    await until('the text', () => workbench.text.isThere());
    // Nothing that makes the files stale.
    await workbench.text.typeAt('end', '\n');
    await workbench.save();
    expect(workbench.files.read('belt.pairing.json')).toBe(`${text}\n`);
    await hasProblem(workbench, problem);
    workbench.files.write(tapsFile, taps);
    await hasNone(workbench);

    workbench.files.write(tapsFile, solvedOtherwise(taps));
    await workbench.palette.run('Tasks: Run Test Task');
    await workbench.palette.choose('Tapwright: check');
    const terminal = workbench.page.locator('.terminal-wrapper.active .xterm-rows');
    const said = await until('the end of the task', async () => {
      const rows = await terminal.locator('> div').allTextContents();
      const all = rows.join('').replaceAll('\u00a0', ' ');
      return all.includes('exit code') && all;
    });
    await workbench.screenshot('task');
    expect(said).toContain(`generated/belt.taps.json:1:1: error: ${problem}`);
    expect(said).toContain('valve.pairing.json:1:1: error: the files of this pairing were never written');
    expect(said).toContain('exit code: 1');
    await hasProblem(workbench, problem);
  });

  flow('finds a moved recording by what it holds', async (workbench) => {
    await openCurrentHeader(workbench);
    const recording = workbench.files.read('slow.csv');
    workbench.files.write('moved/belt at 1.csv', recording);
    rmSync(join(workbench.files.path, 'slow.csv'));
    await hasProblem(workbench, 'slow.csv: ');
    await workbench.openFile('belt.pairing.json');
    await until('the page', () => workbench.frame.isThere());
    const row = workbench.page.locator('.markers-panel .monaco-list-row', { hasText: 'slow.csv: ' });
    await row.first().click();
    await workbench.page.keyboard.press('Control+.');
    const fix = workbench.page.locator('.monaco-menu, .action-widget').getByText('Find the Moved Recording');
    await menuClick(fix, 'the quick fix');
    await until('the new name', () =>
      workbench.files.read('belt.pairing.json').includes('moved/belt at 1.csv'),
    );
    expect(workbench.files.read('belt.pairing.json')).not.toContain('"slow.csv"');
  });

  flow('shows what is written beside what the document gives now', async (workbench) => {
    await openCurrentHeader(workbench);
    const text = workbench.files.read('belt.pairing.json');
    workbench.files.write('belt.pairing.json', text.replace(/"length": \d+/, '"length": 32'));
    await standing(workbench, 'document changed');
    await workbench.openPage('belt.pairing.json');
    await workbench.palette.run(titleOf('tapwright.compare'));
    await until('the comparison', async () => /Preview.*belt/.test((await workbench.activeTab()) ?? ''));
    const drawn = `document.querySelector('img[src^="data:image/svg"]')?.naturalWidth === 460 && document.body.textContent`;
    const text32 = await until('its picture and figures', async () => {
      for (const frame of workbench.page.frames()) {
        const said = await frame.evaluate<string | false>(drawn).catch(() => false);
        if (said) return said;
      }
      return null;
    });
    expect(text32).toContain('length 64 to 32');
    expect(text32).toContain('The pairing document has changed.');
    await workbench.screenshot('comparison');
  });
}

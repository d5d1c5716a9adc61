import { mkdirSync, readdirSync, readFileSync, symlinkSync, unlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect } from 'vitest';
import { designByCommandLine } from './support/commandLine';
import { flows } from './support/flows';
import { waitForHeldOut } from './support/heldOut';
import { titleOf } from './support/manifest';
import { workbenchIsHere } from './support/programs';
import { until } from './support/until';

describe.skipIf(!workbenchIsHere())('in a workspace that is not trusted, in a real workbench', () => {
  const flow = flows({ untrusted: true });

  flow('inspects and previews, writes once it is trusted, and over no link', async (workbench) => {
    const { files } = workbench;
    const before = files.list();
    const page = await workbench.openPage('belt.pairing.json');
    await waitForHeldOut(page, designByCommandLine(files, 'belt.pairing.json').heldOutDb);
    const firmware = page.section('Firmware');
    await until(
      'the preview',
      async () => /#define BELT_LENGTH/.test((await firmware.textContent()) ?? ''),
      60_000,
    );
    expect(await page.text()).toContain('Writing needs a trusted workspace.');
    expect(await page.button('Write files').isDisabled()).toBe(true);
    await workbench.palette.run(titleOf('tapwright.writeFiles'));
    const sentence = workbench.page.getByText('Files are written only in a workspace that you trust');
    await until('the sentence', () => sentence.first().isVisible());
    expect(files.list()).toEqual(before);

    await page.button('Manage trust').click();
    const trust = workbench.page
      .locator('.workspace-trust-editor')
      .getByRole('button', { name: 'Trust', exact: true });
    await until('the button that trusts', () => trust.first().isVisible());
    await trust.first().click();
    await workbench.openFile('belt.pairing.json');
    await until('writing', async () => !(await page.button('Write files').isDisabled()));
    expect(await page.text()).not.toContain('Writing needs a trusted workspace.');

    // Links of the real disk below this file system, which may only be listed as such.
    const outside = join(files.root, 'outside');
    const generated = join(files.path, 'generated');
    mkdirSync(outside);
    writeFileSync(join(outside, 'mine.h'), 'mine');
    const refused = async (first: RegExp) => {
      await page.button('Write files').click();
      await until('the refusal', async () => first.test((await outcome.textContent()) ?? ''));
    };
    const outcome = page.inner.locator('[data-outcome]');
    symlinkSync(outside, generated);
    await refused(/belt_taps\.h.*leads out of the folder.*belt\.note\.md/s);
    unlinkSync(generated);
    mkdirSync(generated);
    symlinkSync(join(outside, 'mine.h'), join(generated, 'belt_taps.h'));
    await refused(/belt_taps\.h(?!.*belt\.note\.md).*leads out of the folder/s);
    expect(readdirSync(outside)).toEqual(['mine.h']);
    expect(readFileSync(join(outside, 'mine.h'), 'utf8')).toBe('mine');
    unlinkSync(join(generated, 'belt_taps.h'));
    // Where files are written before they are put in place.
    for (let n = 1; n <= 20; n++)
      symlinkSync(join(outside, 'mine.h'), join(generated, `belt_taps.h.${n}.tmp`));
    await page.button('Write files').click();
    await until('the files', () => files.exists('generated/belt.taps.json'));
    for (const [path, bytes] of designByCommandLine(files, 'belt.pairing.json').files) {
      expect(Buffer.compare(Buffer.from(files.bytes(path)), bytes), path).toBe(0);
    }
    expect(readFileSync(join(outside, 'mine.h'), 'utf8')).toBe('mine');
  });
});

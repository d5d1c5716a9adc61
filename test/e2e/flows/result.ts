import { expect } from 'vitest';
import { tapwright } from '../../support/cli';
import type { Flow } from '../support/flows';
import { until } from '../support/until';
import { openBelt } from './form';

/** Suggestion, findings and number format, against what the command line says of the same documents. */
export function resultFlows(flow: Flow): void {
  flow('suggests what the command line suggests, and takes it over as one edit', async (workbench) => {
    const page = await openBelt(workbench);
    const suggest = page.button('Suggest');
    await until('a suggestion', () => suggest.isEnabled());
    const { suggestion } = JSON.parse(
      tapwright(workbench.files.path, 'choose', '--json', 'belt.pairing.json').out,
    );
    await suggest.click();
    await until('the document changed', () => workbench.isDirty());
    await workbench.save();
    const { length, delay, regularisation } = suggestion;
    expect(JSON.parse(workbench.files.read('belt.pairing.json')).filter).toMatchObject({
      length,
      delay,
      regularisation,
    });
    expect(await page.field('Length').inputValue()).toBe(String(length));
  });

  flow('tells what the inspection finds and leads to its place', async (workbench) => {
    const page = await workbench.openPage('tubing.pairing.json');
    const suitability = page.section('Suitability');
    const finding = suitability.locator('li[data-code="spectral-null"]');
    await until('the finding', () => finding.isVisible());
    const { findings } = JSON.parse(
      tapwright(workbench.files.path, 'inspect', '--json', 'tubing.pairing.json').out,
    );
    expect(findings.map(({ code }: { code: string }) => code)).toContain('spectral-null');
    expect(await suitability.locator('li[data-code]').count()).toBe(findings.length);
    const show = finding.getByRole('button');
    await show.click();
    await until('the focus to have gone to its place', async () => !(await page.hasFocus(show)));
  });

  flow('shows what a shorter word costs', async (workbench) => {
    const page = await openBelt(workbench);
    const loss = async () => /16-bit loss|8-bit loss/.exec((await page.strip().textContent()) ?? '')?.[0];
    await until('the loss of 16 bits', async () => (await loss()) === '16-bit loss');
    const text = workbench.files.read('belt.pairing.json').replace('"word": 16,', '"word": 8,');
    workbench.files.write('belt.pairing.json', text);
    await until('the loss of 8 bits', async () => (await loss()) === '8-bit loss');
    expect(await page.section('Firmware').textContent()).toContain('8-bit integers');
  });
}

import { expect } from 'vitest';
import { seriousViolations } from '../support/accessibility';
import type { Flow } from '../support/flows';
import { shootSections } from '../support/sections';
import { until } from '../support/until';
import { openBelt } from './form';

/** As the theme picker names them, and as the pictures are named. */
const themes = [
  { label: 'Dark Modern', name: 'dark' },
  { label: 'Light Modern', name: 'light' },
  { label: 'Dark High Contrast', name: 'hc-dark' },
  { label: 'Light High Contrast', name: 'hc-light' },
] as const;

/** The page follows the theme, nothing serious is found, and a picture of each section is taken. */
export function appearanceFlows(flow: Flow): void {
  flow('is legible and accessible in every theme', async (workbench) => {
    const page = await openBelt(workbench);
    await until('nothing left to compute', async () => !(await page.isBusy()), 60_000);
    for (const { label, name } of themes) {
      await workbench.switchTheme(label);
      await until(`the page in ${label}`, async () => (await page.themeKind()) === name);
      await shootSections(workbench, name);
      expect(await seriousViolations(page), label).toEqual([]);
    }
    await workbench.switchTheme(themes[0].label);
  });

  flow('works at 400 px without a scroll bar across', async (workbench) => {
    await workbench.page.setViewportSize({ width: 448, height: 900 });
    try {
      await workbench.palette.run('View: Toggle Primary Side Bar Visibility');
      const page = await openBelt(workbench);
      await until('nothing left to compute', async () => !(await page.isBusy()), 60_000);
      const frame = await page.handle();
      const over = 'document.documentElement.scrollWidth - document.documentElement.clientWidth';
      expect(await frame.evaluate(over)).toBeLessThanOrEqual(0);
      await shootSections(workbench, 'narrow');
    } finally {
      await workbench.palette.run('View: Toggle Primary Side Bar Visibility');
      await workbench.page.setViewportSize({ width: 1400, height: 1000 });
    }
  });

  flow('asks for nothing that its content security policy refuses', async (workbench) => {
    await openBelt(workbench);
    const refused = workbench.complaints.filter((text) => /Content Security Policy/i.test(text));
    expect(refused).toEqual([]);
  });
}

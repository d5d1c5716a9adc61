import type { Workbench } from './workbench';

/** For the longest section to be seen whole. */
const tall = 4000;
/** Around a section. */
const margin = 16;

const sections = ['Recordings', 'Suitability', 'Design', 'Evidence', 'Firmware'] as const;

/** Pictures of the window and of every section of the page in front, as `out/screenshots/THEME-SECTION.png`. */
export async function shootSections(workbench: Workbench, theme: string): Promise<void> {
  const { page, frame } = workbench;
  const usual = page.viewportSize() ?? { width: 1400, height: 1000 };
  await workbench.screenshot(`${theme}-window`);
  await page.setViewportSize({ width: usual.width, height: tall });
  try {
    for (const heading of sections) {
      const section = frame.section(heading);
      await section.evaluate((element) => element.scrollIntoView({ block: 'start' }));
      const box = await section.boundingBox();
      if (box === null) throw new Error(`the section ${heading} is not to be seen`);
      if (box.height > tall) throw new Error(`the section ${heading} is ${box.height} pixels high`);
      const clip = {
        x: Math.max(0, box.x - margin),
        y: Math.max(0, box.y - margin),
        width: box.width + 2 * margin,
        height: box.height + 2 * margin,
      };
      await page.screenshot({ path: workbench.pictureOf(`${theme}-${heading.toLowerCase()}`), clip });
    }
  } finally {
    await page.setViewportSize(usual);
  }
}

import type { PageFrame } from './pageFrame';
import { until } from './until';

/** The held-out figure that the strip shows, dB; null where it shows none. */
export async function heldOutShown(page: PageFrame): Promise<number | null> {
  const text = (await page.strip().allTextContents()).join(' ');
  const figure = /held[- ]out\s*([−-]?\d+\.\d+)/i.exec(text)?.[1];
  return figure === undefined ? null : Number(figure.replace('−', '-'));
}

/** Waits until the strip shows this figure, which is rounded to a tenth there and to a hundredth in the files. */
export async function waitForHeldOut(page: PageFrame, db: number): Promise<void> {
  let last: number | null = null;
  await until(`held-out ${db} dB in the strip`, async () => {
    last = await heldOutShown(page);
    return last !== null && Math.abs(last - db) < 0.056;
  }).catch((error) => {
    throw new Error(`${error.message}, which shows ${last}`);
  });
}

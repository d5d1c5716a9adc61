import { rmSync } from 'node:fs';
import { join } from 'node:path';
import { expect } from 'vitest';
import type { Flow } from '../support/flows';
import { heldOutShown } from '../support/heldOut';
import { menuTitleOf } from '../support/manifest';
import { monoWav, npyOf } from '../support/sampleFiles';
import { until } from '../support/until';
import type { Workbench } from '../support/workbench';

/** Two recordings of which the second is the first, delayed and weaker, and a little noise. */
function pairOfSignals(samples: number): { reference: Float64Array; sensor: Float64Array } {
  let state = 12345;
  const noise = () => {
    state = (Math.imul(state, 1103515245) + 12345) & 0x7fffffff;
    return state / 0x40000000 - 1;
  };
  const reference = Float64Array.from({ length: samples }, noise);
  const sensor = reference.map(
    (_, n) => 0.5 * (reference[n - 2] ?? 0) + 0.2 * (reference[n - 3] ?? 0) + 0.01 * noise(),
  );
  return { reference, sensor };
}

/** Takes the first answer of every picker, which is to be the likely one, until a pairing opens. */
async function takeLikelyAnswers(workbench: Workbench, made: () => boolean): Promise<void> {
  let asked = '';
  await until(
    'a pairing',
    async () => {
      if (made()) return true;
      if (!(await workbench.palette.isOpen())) return false;
      const now = `${await workbench.palette.question()} ${await workbench.palette.labels()}`;
      if (now !== asked) {
        asked = now;
        await workbench.page.keyboard.press('Enter');
      }
      return false;
    },
    60_000,
  );
}

/** Recordings by themselves and made into pairs. */
export function recordingFlows(flow: Flow): void {
  flow('pairs two recordings from the explorer', async (workbench) => {
    const { reference, sensor } = pairOfSignals(8000);
    workbench.files.write('shaker.wav', monoWav(reference, 1000));
    workbench.files.write('sensor.wav', monoWav(sensor, 1000));
    const known = workbench.files.list().filter((path) => path.endsWith('.pairing.json'));
    const made = () =>
      workbench.files.list().find((path) => path.endsWith('.pairing.json') && !known.includes(path));
    await workbench.explorer.contextMenu(
      ['sensor.wav', 'shaker.wav'],
      menuTitleOf('tapwright.pairRecordings'),
    );
    await takeLikelyAnswers(workbench, () => made() !== undefined);
    const document = JSON.parse(workbench.files.read(made() as string));
    const [take] = document.takes;
    const files = [take.inputs[0].file, take.desired.file].sort();
    expect(files).toEqual(['sensor.wav', 'shaker.wav']);
    await until('its page', () => workbench.frame.isThere());
    await until('its figure', async () => (await heldOutShown(workbench.frame)) !== null);
  });

  flow('opens a recording that has no editor of its own', async (workbench) => {
    const { reference } = pairOfSignals(4000);
    workbench.files.write('shaker.npy', npyOf(reference));
    await workbench.explorer.waitFor('shaker.npy');
    const page = await workbench.openPage('shaker.npy');
    const size = /4[,.\u202f\u00a0 ]?000/;
    await until('its size', async () => size.test(await page.text()));
    rmSync(join(workbench.files.path, 'shaker.npy'));
    await until('that it is gone', async () => (await page.text()).includes('The file is no longer there'));
    workbench.files.write('shaker.npy', npyOf(reference));
    await until('its size again', async () => size.test(await page.text()));
  });
}

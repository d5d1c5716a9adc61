import { existsSync } from 'node:fs';
import { join } from 'node:path';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { unpackedPackage } from '../../support/unpackedPackage';
import { startBrowser } from './browser';
import { titleOf } from './manifest';
import { project } from './places';
import { SecondTries } from './secondTries';
import { tryTwice } from './tryTwice';
import { Workbench } from './workbench';
import type { PageOptions } from './workbenchPage';

/** Both tries, each with a start of its own. */
const timeout = 600_000;

export type Flow = (name: string, run: (workbench: Workbench) => Promise<void>) => void;

/**
 * Makes the flows of a `describe`. They share one workbench, which each finds with nothing open and the sample bench as
 * it is checked in; after a failure the next try gets a fresh one.
 */
export function flows(options: PageOptions = {}): Flow {
  let browser: Browser | null = null;
  let workbench: Workbench | null = null;
  const tries = new SecondTries();

  beforeAll(async () => {
    if (!existsSync(join(project, 'dist', 'web', 'extension.js'))) {
      throw new Error('dist/web/extension.js is not there: npm run build first');
    }
    browser = await startBrowser();
  });

  afterAll(async () => {
    await workbench?.close();
    await browser?.close();
  });

  async function prepared(): Promise<Workbench> {
    if (workbench === null) {
      workbench = await Workbench.open(browser as Browser, {
        ...options,
        // What a user installs, not the tree it is made from.
        extension: unpackedPackage(project).extension,
        command: titleOf('tapwright.openSampleBench'),
      });
    } else await workbench.reset();
    return workbench;
  }

  return (name, run) => {
    const file = `failed-${name.replace(/\W+/g, '-')}`;
    const afterFailure = async () => {
      const failed = workbench;
      workbench = null;
      if (failed === null) return 'no workbench';
      const picture = await failed.screenshot(file).catch((error) => `no picture: ${error}`);
      const complaints = failed.complaints.slice(-20).join('\n');
      await failed.close();
      return `${picture}\n${complaints}`;
    };
    const once = async () => {
      const ready = await prepared();
      ready.complaints.length = 0;
      await run(ready);
      expect(ready.complaints.filter((text) => text.startsWith('page error')).join('\n')).toBe('');
    };
    it(name, () => tryTwice(name, once, afterFailure, tries), timeout);
  };
}

import { type Browser, chromium as engine } from 'playwright-core';
import { chromium } from './places';

const quiet = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/** Starts the machine's own browser without a window. */
export async function startBrowser(): Promise<Browser> {
  const executablePath = chromium();
  if (executablePath === null) throw new Error('there is no chromium');
  return engine.launch({ executablePath, headless: true, args: quiet });
}

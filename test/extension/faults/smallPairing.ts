import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { buildSync } from 'esbuild';
import { type CliRun, emptyFolder, project } from '../../support/cli';
import { normals } from '../../support/random';

/** The document of {@link smallPairing}. */
export const small = 'case.pairing.json';

/** Milliseconds that tests may take which start many processes: for machines that have other work. */
export const patience = 300_000;

/** Text of the small document. */
export function smallDocument(length = 8): string {
  return JSON.stringify({
    pairing: 1,
    title: 'Case',
    job: 'identify',
    sampleRate: 1000,
    takes: [
      {
        inputs: [{ file: 'a.csv', channel: 'x' }],
        desired: { file: 'a.csv', channel: 'd' },
        fit: { from: 0, to: 0.25 },
        heldOut: { from: 0.25, to: 0.4 },
      },
    ],
    filter: { length },
    write: { symbol: 'case_one' },
  });
}

/** 400 samples of noise and what a short path makes of it. */
export function smallRecording(seed = 1): string {
  const x = normals(seed, 400);
  const rows = Array.from(
    x,
    (value, n) => `${value.toFixed(5)},${(0.5 * value + 0.25 * (x[n - 1] ?? 0)).toFixed(5)}`,
  );
  return `x,d\n${rows.join('\n')}\n`;
}

/** A new folder with a pairing that is designed in a moment. */
export function smallPairing(): string {
  const folder = emptyFolder();
  writeFileSync(join(folder, 'a.csv'), smallRecording());
  writeFileSync(join(folder, small), smallDocument());
  return folder;
}

export interface FaultRun extends CliRun {
  signal: NodeJS.Signals | null;
}

/** What happens at one call of the file system: see `atCall.ts`. */
export type Fault = Record<string, string | number>;

/** Runs the built command line with a fault. */
export function withFault(folder: string, fault: Fault, ...args: string[]): FaultRun {
  return runScript(folder, fault, join(project, 'dist', 'cli.js'), ...args);
}

let hook: string | null = null;

/** `atCall.ts`, as Node can load it. */
function bundledHook(): string {
  hook ??= join(emptyFolder(), 'atCall.mjs');
  if (!existsSync(hook)) {
    buildSync({
      entryPoints: [join(__dirname, 'atCall.ts')],
      platform: 'node',
      format: 'esm',
      outfile: hook,
    });
  }
  return hook;
}

/** Runs a script with a fault. */
export function runScript(folder: string, fault: Fault, ...args: string[]): FaultRun {
  const address = pathToFileURL(bundledHook());
  for (const [name, value] of Object.entries(fault)) address.searchParams.set(name, `${value}`);
  const { status, signal, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', address.href, ...args],
    {
      cwd: folder,
      encoding: 'utf8',
      timeout: 30_000,
    },
  );
  return { status, signal, out: stdout, err: stderr };
}

/** Names beside the written files that are not theirs. */
export function leftovers(folder: string): string[] {
  return readdirSync(folder, { recursive: true })
    .map(String)
    .filter((name) => name.endsWith('.tmp'));
}

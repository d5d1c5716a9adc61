import { spawnSync } from 'node:child_process';
import { cpSync, mkdtempSync, readdirSync, readFileSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, relative } from 'node:path';

export const project = join(__dirname, '..', '..');

export interface CliRun {
  status: number | null;
  out: string;
  err: string;
}

/** Runs the built command line. */
export function tapwright(cwd: string, ...args: string[]): CliRun {
  const run = spawnSync(process.execPath, [join(project, 'dist', 'cli.js'), ...args], {
    cwd,
    encoding: 'utf8',
  });
  return { status: run.status, out: run.stdout, err: run.stderr };
}

/** A new folder with nothing in it. */
export function emptyFolder(): string {
  return mkdtempSync(join(tmpdir(), 'tapwright-'));
}

/** A copy of the sample bench in a new folder. */
export function benchCopy(): string {
  const folder = emptyFolder();
  cpSync(join(project, 'media', 'bench'), folder, { recursive: true });
  return folder;
}

/** Every file below a folder with its bytes in base64, to see that nothing changed. */
export function snapshot(folder: string): Record<string, string> {
  const files: Record<string, string> = {};
  const visit = (place: string) => {
    for (const name of readdirSync(place)) {
      const path = join(place, name);
      if (statSync(path).isDirectory()) visit(path);
      else files[relative(folder, path)] = readFileSync(path).toString('base64');
    }
  };
  visit(folder);
  return files;
}

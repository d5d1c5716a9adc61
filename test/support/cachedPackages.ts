import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, mkdtempSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { project } from './cli';

/**
 * Packages that the lock file leaves out, since their own install scripts break it: put by npm into a folder of their own,
 * once, and used again. What is there is whole, since a folder is renamed when it is.
 * @param name of the folder under `out`
 * @param wanted packages with their versions
 * @param further folders under it that have dependencies of their own to be installed
 * @returns the folder, or why it cannot be had, in words
 */
export function cachedPackages(
  name: string,
  wanted: readonly string[],
  further: readonly string[] = [],
): { folder: string } | { missing: string } {
  const folder = join(project, 'out', name);
  if (existsSync(join(folder, 'node_modules'))) return { folder };
  mkdirSync(dirname(folder), { recursive: true });
  const beside = mkdtempSync(`${folder}-`);
  writeFileSync(join(beside, 'package.json'), '{ "private": true }\n');
  const trouble =
    npmInstall(beside, wanted) ??
    further.map((place) => npmInstall(join(beside, place), ['--omit=dev'])).find((text) => text !== null);
  if (trouble != null) {
    rmSync(beside, { recursive: true, force: true });
    return { missing: `${wanted.join(' and ')} cannot be installed: ${trouble}` };
  }
  rmSync(folder, { recursive: true, force: true });
  renameSync(beside, folder);
  return { folder };
}

/** @returns npm's last lines where it failed, otherwise null */
function npmInstall(cwd: string, words: readonly string[]): string | null {
  const quiet = [
    '--ignore-scripts',
    '--no-audit',
    '--no-fund',
    '--no-save',
    '--prefer-offline',
    '--loglevel=error',
  ];
  const run = spawnSync('npm', ['install', ...quiet, ...words], { cwd, encoding: 'utf8', timeout: 300_000 });
  if (run.status === 0) return null;
  return `${run.error?.message ?? ''} ${run.stderr ?? ''}`.trim().split('\n').slice(-3).join(' ');
}

/** The folder; where it cannot be had the tests are left out in so many words, and on a CI machine that is a failure. */
export function folderOrSkip(found: ReturnType<typeof cachedPackages>, what: string): string | null {
  if ('folder' in found) return found.folder;
  if (process.env.CI) throw new Error(`${found.missing}, and this is a CI machine`);
  console.warn(`left out: ${what}: ${found.missing}`);
  return null;
}

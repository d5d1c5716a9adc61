import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  statSync,
} from 'node:fs';
import { join } from 'node:path';
import { buildSync } from 'esbuild';
import { unzip } from './unzip';

export interface UnpackedPackage {
  /** The file that a user installs. */
  vsix: string;
  /** The extension's folder as installing unpacks it. */
  extension: string;
}

/** Files of the project that a package is made of, and what makes it. */
const rootFiles = /^(package\.json|package\.nls.*\.json|package\.ts|notices\.ts|.*\.md|LICENSE)$/;

/** Packages of earlier builds are kept that long, since another process may still use one. */
const kept = 60 * 60_000;

/**
 * The package of what is built now, unpacked under `out/package`: made when it is first asked for, and used again as long
 * as no file that goes into it changes.
 * @param project the project's root; the commands are run there
 */
export function unpackedPackage(project = process.cwd()): UnpackedPackage {
  const packages = join(project, 'out', 'package');
  mkdirSync(packages, { recursive: true });
  const folder = join(packages, digestOf(project));
  if (!existsSync(folder)) {
    removeOld(packages);
    make(project, packages, folder);
  }
  const { name, version } = JSON.parse(readFileSync(join(folder, 'extension', 'package.json'), 'utf8'));
  return { vsix: join(folder, `${name}-${version}.vsix`), extension: join(folder, 'extension') };
}

/** Packs beside the place and renames, so that a folder that is there is whole. */
function make(project: string, packages: string, folder: string): void {
  const beside = mkdtempSync(join(packages, 'making-'));
  const command = join(beside, 'package.js');
  buildSync({
    absWorkingDir: project,
    entryPoints: ['package.ts'],
    bundle: true,
    packages: 'external',
    platform: 'node',
    outfile: command,
    logLevel: 'warning',
  });
  // A pipe, so that nothing asks and nothing looks for news.
  execFileSync(process.execPath, [command, 'package', beside], { cwd: project, stdio: 'pipe' });
  const vsix = readdirSync(beside).find((name) => name.endsWith('.vsix'));
  if (vsix === undefined) throw new Error('no package was made');
  unzip(readFileSync(join(beside, vsix)), beside);
  try {
    renameSync(beside, folder);
  } catch (error) {
    // Another process was faster.
    if (!existsSync(folder)) throw error;
    rmSync(beside, { recursive: true });
  }
}

/** Of the paths and bytes of all that may go into the package. */
function digestOf(project: string): string {
  const below = ['dist', 'media']
    .flatMap((name) =>
      readdirSync(join(project, name), { recursive: true, encoding: 'utf8' }).map((path) => join(name, path)),
    )
    .filter((path) => statSync(join(project, path)).isFile());
  const root = readdirSync(project).filter((name) => rootFiles.test(name));
  const hash = createHash('sha256');
  for (const path of [...root, ...below].sort()) {
    const bytes = readFileSync(join(project, path));
    hash.update(`${path}\0${bytes.length}\0`).update(bytes);
  }
  return hash.digest('hex').slice(0, 16);
}

function removeOld(packages: string): void {
  for (const name of readdirSync(packages)) {
    const path = join(packages, name);
    if (Date.now() - statSync(path).mtimeMs > kept) rmSync(path, { recursive: true, force: true });
  }
}

import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { build } from 'esbuild';
import { e2eFolder } from './places';

/** Bundles the test file system for a web extension host; its files by name. */
export async function buildFileSystem(): Promise<Record<string, string>> {
  const folder = join(e2eFolder, 'fileSystem');
  const result = await build({
    entryPoints: [join(folder, 'extension.ts')],
    bundle: true,
    format: 'cjs',
    platform: 'browser',
    target: 'es2022',
    external: ['vscode'],
    write: false,
    logLevel: 'warning',
  });
  return {
    'package.json': await readFile(join(folder, 'package.json'), 'utf8'),
    'extension.js': result.outputFiles[0].text,
  };
}

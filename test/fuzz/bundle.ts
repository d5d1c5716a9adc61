import { join } from 'node:path';
import { build } from 'esbuild';

/** The folder of bundles, failing inputs and files of processes. */
export const fuzzFolder = join('out', 'fuzz');

/** Bundles what `npm run fuzz` runs, for tests. */
export async function bundleFuzz(): Promise<string> {
  const outfile = join(fuzzFolder, 'fuzz.js');
  await build({
    entryPoints: [join('test', 'fuzz', 'fuzz.ts')],
    bundle: true,
    platform: 'node',
    format: 'cjs',
    mainFields: ['module', 'main'],
    outfile,
    logLevel: 'warning',
  });
  return outfile;
}

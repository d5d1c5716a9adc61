import { build } from 'esbuild';

/** Bundles what runs: the command line, as one CommonJS file. */
async function main(): Promise<void> {
  const result = await build({
    entryPoints: { cli: 'extension/node/cli.ts', start: 'extension/node/start.ts' },
    outdir: 'dist',
    bundle: true,
    platform: 'node',
    // jsonc-parser's main entry hides its own files from the bundler.
    mainFields: ['module', 'main'],
    format: 'cjs',
    target: 'node20',
    minify: true,
    keepNames: true,
    metafile: true,
    logLevel: 'warning',
    banner: { js: '#!/usr/bin/env node' },
  });
  for (const [file, output] of Object.entries(result.metafile.outputs)) {
    console.log(`${file}  ${(output.bytes / 1024).toFixed(0)} KiB`);
  }
}

main().catch(() => {
  process.exitCode = 1;
});

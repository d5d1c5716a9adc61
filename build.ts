import { existsSync, readdirSync, writeFileSync } from 'node:fs';
import { type BuildOptions, build, type Metafile } from 'esbuild';

/** One run of the bundler; entries that are not there yet are left out. */
interface Bundle {
  entries: Record<string, string>;
  options: BuildOptions;
}

/** An extension's folder cannot be listed everywhere: the files of the sample bench are listed here. */
const benchFiles = readdirSync('media/bench').filter((file) => !file.startsWith('.'));

const node: BuildOptions = { platform: 'node', target: 'node20', format: 'cjs' };
const browser: BuildOptions = { platform: 'browser', target: 'es2022' };

const bundles: Bundle[] = [
  {
    entries: { cli: 'extension/node/cli.ts', start: 'extension/node/start.ts' },
    options: { ...node, keepNames: true, banner: { js: '#!/usr/bin/env node' } },
  },
  { entries: { extension: 'extension/node/main.ts' }, options: { ...node, external: ['vscode'] } },
  { entries: { worker: 'extension/node/worker.ts' }, options: node },
  {
    entries: { 'web/extension': 'extension/web/main.ts' },
    options: { ...browser, format: 'cjs', external: ['vscode'] },
  },
  { entries: { 'web/worker': 'extension/web/worker.ts' }, options: { ...browser, format: 'iife' } },
  {
    entries: { page: 'webview/page.ts' },
    options: { ...browser, format: 'iife', define: { 'process.env.NODE_ENV': '"production"' } },
  },
  { entries: { page: 'webview/page.css' }, options: browser },
];

/** Bundles what runs: command line, the two sides of the extension, and the page. Prints every size. */
async function main(): Promise<void> {
  const made: Metafile[] = [];
  for (const { entries, options } of bundles) {
    const there = Object.entries(entries).filter(([, file]) => existsSync(file));
    if (there.length === 0) continue;
    const result = await build({
      entryPoints: Object.fromEntries(there),
      outdir: 'dist',
      bundle: true,
      // jsonc-parser's main entry hides its own files from the bundler.
      mainFields: ['module', 'main'],
      minify: true,
      logLevel: 'warning',
      ...options,
      define: { benchFiles: JSON.stringify(benchFiles), ...options.define },
      metafile: true,
    });
    made.push(result.metafile);
    for (const [file, output] of Object.entries(result.metafile.outputs)) {
      console.log(`${file}  ${(output.bytes / 1024).toFixed(0)} KiB`);
    }
  }
  // What the bundles were made of, for the notices.
  writeFileSync('dist/metafiles.json', JSON.stringify(made));
}

main().catch(() => {
  process.exitCode = 1;
});

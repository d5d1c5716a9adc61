import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { createVSIX } from '@vscode/vsce';
import { notices, readMetafiles } from './notices';

const noticesFile = 'THIRD-PARTY-NOTICES.md';

/** Without it the package would hold the time of the build; the first day that its format can tell. */
const always = '315532800';

/** All that the manifest's `files` can name. */
const staged = /^(dist|media|package\.json|package\.nls.*\.json|.*\.md|LICENSE)$/;

/**
 * `package`: makes `tapwright-VERSION.vsix` of what was built, in the current folder or the one named. The same files give
 * the same bytes. `notices`: writes the licences of what the bundles hold.
 */
async function main([what = 'package', folder = '.']: string[]): Promise<void> {
  const text = notices(readMetafiles());
  if (what === 'notices') {
    writeFileSync(noticesFile, text);
    return;
  }
  if (readFileSync(noticesFile, 'utf8') !== text) {
    throw new Error(`${noticesFile} is not that of the bundles: npm run notices first`);
  }
  process.env.SOURCE_DATE_EPOCH = always;
  const stage = mkdtempSync(join(tmpdir(), 'tapwright-package-'));
  try {
    // The packer walks through everything beside the manifest, however little of it is listed there.
    for (const name of readdirSync('.').filter((entry) => staged.test(entry))) {
      cpSync(name, join(stage, name), { recursive: true });
    }
    await createVSIX({
      cwd: stage,
      dependencies: false,
      allowMissingRepository: true,
      rewriteRelativeLinks: false,
      // Translations of the manifest are listed whether or not there are any.
      allowUnusedFilesPattern: true,
      packagePath: resolve(folder),
    });
  } finally {
    rmSync(stage, { recursive: true, force: true });
  }
}

main(process.argv.slice(2)).catch((error) => {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
});

import { execFileSync } from 'node:child_process';
import { cpSync, mkdtempSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { benchCopy, snapshot, tapwright } from '../support/cli';
import { type UnpackedPackage, unpackedPackage } from '../support/unpackedPackage';
import { type ZipEntry, zipEntries } from '../support/unzip';

// The file that a user installs.

/** Bytes at most beside the sample bench. */
const largest = 1024 * 1024;

let made: UnpackedPackage;
let entries: ZipEntry[];

beforeAll(() => {
  made = unpackedPackage();
  entries = zipEntries(readFileSync(made.vsix));
});

const bench = (path: string) => path.startsWith('extension/media/bench/');
const text = (path: string) => entries.find((entry) => entry.path === path)!.bytes.toString();

describe('the package', () => {
  it('is under 1 MiB beside the sample bench', () => {
    const sizes = entries
      .filter(({ path }) => !bench(path))
      .map(({ packed, path }) => packed + 2 * path.length + 92);
    expect(sizes.reduce((sum, size) => sum + size)).toBeLessThan(largest);
  });

  it('holds what runs, what is read, and nothing else', () => {
    const pictures = /^extension\/media\/.*\.(png|svg)$/;
    const translations = /^extension\/(media\/l10n\/.*\.json|package\.nls(\..*)?\.json)$/;
    const paths = entries.map(({ path }) => path);
    const expected = [
      '[Content_Types].xml',
      'extension.vsixmanifest',
      ...[
        'LICENSE.txt',
        'THIRD-PARTY-NOTICES.md',
        'changelog.md',
        'dist/cli.js',
        'dist/extension.js',
        'dist/page.css',
        'dist/page.js',
        'dist/web/extension.js',
        'dist/web/worker.js',
        'dist/worker.js',
        'media/icon.png',
        'media/pairing.schema.json',
        'package.json',
        'readme.md',
      ].map((path) => `extension/${path}`),
    ];
    expect(expected.filter((path) => !paths.includes(path))).toEqual([]);
    const others = paths.filter((path) => !expected.includes(path) && !bench(path));
    expect(
      others.filter(
        (path) =>
          !pictures.test(path) &&
          !translations.test(path) &&
          !/^extension\/media\/[\w-]+\/.*\.md$/.test(path),
      ),
    ).toEqual([]);
  });

  it('holds every picture and file that its README leads to', () => {
    const paths = new Set(entries.map(({ path }) => path.toLowerCase()));
    const links = [...text('extension/readme.md').matchAll(/\]\(([^)\s]+)\)|src="([^"]+)"/g)].map(
      ([, link, source]) => link ?? source,
    );
    const pictures = links.filter((link) => /\.(png|jpe?g|gif|svg)$/i.test(link));
    expect(pictures.filter((link) => !paths.has(`extension/${link}`.toLowerCase()))).toEqual([]);
  });

  it('holds the sample bench as it is checked in', () => {
    const names = entries.filter(({ path }) => bench(path)).map(({ path }) => path);
    expect(names.length).toBeGreaterThan(9);
    for (const path of names) {
      const { bytes } = entries.find((entry) => entry.path === path)!;
      expect(bytes.equals(readFileSync(path.slice('extension/'.length))), path).toBe(true);
    }
  });

  it('has no source map, no path and no address of where it was made', () => {
    for (const { path, bytes } of entries) {
      const content = bytes.toString('latin1');
      expect(content, path).not.toContain('sourceMappingURL=');
      expect(content, path).not.toContain(process.cwd());
    }
  });

  it('has the same bytes when it is made again', () => {
    const folder = mkdtempSync(join(tmpdir(), 'tapwright-again-'));
    const command = join(made.extension, '..', 'package.js');
    execFileSync(process.execPath, [command, 'package', folder], { stdio: 'pipe' });
    const again = readFileSync(join(folder, made.vsix.slice(made.vsix.lastIndexOf('/') + 1)));
    expect(again.equals(readFileSync(made.vsix))).toBe(true);
  });

  it('needs no module beside itself on the command line, and designs as the checkout does', () => {
    const alone = mkdtempSync(join(tmpdir(), 'tapwright-alone-'));
    cpSync(made.extension, alone, { recursive: true });
    const [packed, checkout] = [benchCopy(), benchCopy()];
    const run = execFileSync(
      process.execPath,
      [join(alone, 'dist', 'cli.js'), 'design', 'valve.pairing.json'],
      {
        cwd: packed,
        encoding: 'utf8',
        stdio: 'pipe',
      },
    );
    expect(run).toBe(tapwright(checkout, 'design', 'valve.pairing.json').out);
    expect(snapshot(packed)).toEqual(snapshot(checkout));
  });
});

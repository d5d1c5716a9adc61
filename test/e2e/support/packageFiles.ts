import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

/** What a package holds whether or not the manifest lists it. */
const always = /^(package\.json|package\.nls(\.[\w-]+)?\.json|README\.md|CHANGELOG\.md|LICENSE)$/;

/** Where the manifest has no `files`. */
const usual = ['dist/web', 'dist/page.js', 'dist/page.css', 'l10n', 'media'];

/**
 * Tells whether the extension's package would hold a file, so that nothing works here that a user would miss.
 * @param folder where the manifest is
 * @returns a test of a path from that folder, with forward slashes
 */
export function packageFiles(folder: string): (path: string) => boolean {
  const { files } = JSON.parse(readFileSync(join(folder, 'package.json'), 'utf8')) as { files?: string[] };
  const listed = (files ?? usual).filter((entry) => !entry.startsWith('!')).map(pattern);
  const barred = (files ?? [])
    .filter((entry) => entry.startsWith('!'))
    .map((entry) => pattern(entry.slice(1)));
  return (path) =>
    always.test(path) ||
    (listed.some((entry) => entry.test(path)) && !barred.some((entry) => entry.test(path)));
}

/** Every file of the package that is there, to list what is served. */
export function filesOfPackage(folder: string): string[] {
  const held = packageFiles(folder);
  const names = ['dist', 'l10n', 'media'].filter((name) => existsSync(join(folder, name)));
  return names
    .flatMap((name) =>
      readdirSync(join(folder, name), { recursive: true, encoding: 'utf8' }).map((path) => `${name}/${path}`),
    )
    .filter(held);
}

/** A folder or file, `*` for a part of a name and `**` for any folders. */
function pattern(entry: string): RegExp {
  const plain = entry.replace(/^\.?\//, '').replace(/\/$/, '');
  const source = plain.replace(/[.+^${}()|[\]\\?]/g, '\\$&').replace(/\*\*\/?|\*/g, (stars) => {
    return stars === '*' ? '[^/]*' : '.*';
  });
  return new RegExp(`^${source}(/.*)?$`);
}

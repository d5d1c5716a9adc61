import { readdirSync, readFileSync } from 'node:fs';
import type { Metafile } from 'esbuild';

/** A package of which the bundles hold at least one byte. */
interface Bundled {
  folder: string;
  name: string;
  version: string;
  licence: string;
}

/** Packages of one maker and licence that carry no text of it, and the one that does. */
const sameText: Record<string, string> = {
  '@microsoft/fast-element': '@vscode/webview-ui-toolkit',
  '@microsoft/fast-foundation': '@vscode/webview-ui-toolkit',
  '@microsoft/fast-web-utilities': '@vscode/webview-ui-toolkit',
};

const head = `# Third-party notices

Parts of these packages are inside the files under \`dist\`. Each is under its own licence, which follows. This file is made by
\`npm run notices\`.
`;

/** The folder under node_modules that a bundled file belongs to; null for the project's own. */
function packageFolder(file: string): string | null {
  return /^(?:.*\/)?node_modules\/(?:@[^/]+\/)?[^/]+(?=\/)/.exec(file)?.[0] ?? null;
}

/** Packages in the bundles, by name and version, each once. */
export function bundledPackages(metafiles: readonly Metafile[]): Bundled[] {
  const folders = new Set<string>();
  for (const { outputs } of metafiles) {
    for (const { inputs } of Object.values(outputs)) {
      for (const [file, { bytesInOutput }] of Object.entries(inputs)) {
        const folder = bytesInOutput > 0 ? packageFolder(file) : null;
        if (folder !== null) folders.add(folder);
      }
    }
  }
  const found = [...folders].map((folder) => {
    const { name, version, license } = JSON.parse(readFileSync(`${folder}/package.json`, 'utf8'));
    return { folder, name, version, licence: license };
  });
  const key = ({ name, version }: Bundled) => `${name} ${version}`;
  return found.sort((a, b) => (key(a) < key(b) ? -1 : 1));
}

/**
 * The licence's own text.
 * @throws Error where neither the package nor another of the same maker has one
 */
function licenceText({ folder, name, licence }: Bundled): string {
  const file = readdirSync(folder).find((entry) => /^licen[cs]e(\.(md|txt))?$/i.test(entry));
  if (file !== undefined) return tidy(readFileSync(`${folder}/${file}`, 'utf8'));
  const other = `node_modules/${sameText[name]}`;
  const [own, others] = [folder, other].map((place) =>
    JSON.parse(readFileSync(`${place}/package.json`, 'utf8')),
  );
  if (others.license !== licence || makerOf(others) !== makerOf(own)) {
    throw new Error(`${name} has no text of its licence ${licence}`);
  }
  return tidy(readFileSync(`${other}/LICENSE`, 'utf8'));
}

/** The first word: a company signs with and without its legal form. */
function makerOf({ author }: { author: string | { name: string } }): string {
  return (typeof author === 'string' ? author : author.name).split(' ')[0];
}

/** Lines end with LF and without spaces; no empty lines around. */
function tidy(text: string): string {
  return text
    .replace(/\r\n?/g, '\n')
    .replace(/[^\S\n]+$/gm, '')
    .trim();
}

/** The notices of what the bundles hold. */
export function notices(metafiles: readonly Metafile[]): string {
  const sections = bundledPackages(metafiles).map((one) => {
    const text = licenceText(one);
    if (text.includes('```')) throw new Error(`the licence of ${one.name} would close its block`);
    return `## ${one.name} ${one.version} (${one.licence})\n\n\`\`\`text\n${text}\n\`\`\`\n`;
  });
  return [head, ...sections].join('\n');
}

export function readMetafiles(): Metafile[] {
  return JSON.parse(readFileSync('dist/metafiles.json', 'utf8'));
}

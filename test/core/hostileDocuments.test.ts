import { describe, expect, it } from 'vitest';
import { designFiles } from '../../core/files/designFiles';
import { problemLine } from '../../core/findings/problemLine';
import { design } from '../../core/pipeline/design';
import { hostileNames } from '../support/hostileNames';
import { memoryHost } from '../support/memoryHost';
import { nodeSha256 } from '../support/nodeSha256';
import { normals } from '../support/random';
import { xmlFault } from '../support/wellFormedXml';

// Whole designs of documents that somebody else sent: every name in them is data, in every file that is written.

const hidden = /[\p{C}\p{Zl}\p{Zp}]/u;
const names = [
  ...hostileNames,
  '[Run](command:workbench.action.terminal.new)',
  '$(touch owned) `touch owned` ; touch owned',
  '\u2066turned\u2069',
  '#include "owned.h"',
  '\\u002a/ \\x2a/ %:include',
  'x" onload="alert(1)',
  ']]> <!ENTITY x SYSTEM "file:///etc/passwd">',
];

const rows = (() => {
  const x = normals(1, 900);
  return Array.from(x, (value, n) => `${value.toFixed(4)},${(value - 0.5 * (x[n - 1] ?? 0)).toFixed(4)}`);
})();

const cell = (text: string) => `"${text.replaceAll('"', '""')}"`;

interface Names {
  title: string;
  take: string;
  file: string;
  input: string;
  desired: string;
  document: string;
}
const calmNames: Names = {
  title: 'calm',
  take: 'calm',
  file: 'calm.csv',
  input: 'calm',
  desired: 'other',
  document: 'calm.pairing.json',
};

/** Designs with these names and writes every language; the document's own name is part of the files'. */
async function designed(given: Names) {
  const text = JSON.stringify({
    pairing: 1,
    title: given.title,
    job: 'identify',
    sampleRate: 1000,
    takes: [
      {
        name: given.take,
        inputs: [{ file: `./${given.file}`, channel: given.input }],
        desired: { file: `./${given.file}`, channel: given.desired },
        fit: { from: 0, to: 0.6 },
        heldOut: { from: 0.6, to: 0.9 },
      },
    ],
    filter: { length: 4 },
    write: { symbol: 'calm', languages: ['c', 'c-source', 'rs', 'csv', 'npy'] },
  });
  const csv = `${cell(given.input)},${cell(given.desired)}\n${rows.join('\n')}\n`;
  const host = memoryHost({ [given.file]: csv });
  const { result, findings } = await design(host, text, { file: given.document, folder: '' });
  const lines = findings.map((found) => problemLine(found, given.document, text));
  return { files: result === null ? null : designFiles(result, nodeSha256), lines };
}

/** Source without its comments and with nothing but its code left. */
const code = (source: string) =>
  source
    .replace(/\/\*[\s\S]*?\*\//g, '')
    .replace(/^\s*(\/\/|#(?!\s*(include|define|ifdef|ifndef|if|endif|else|error|\[|!\[))).*$/gm, '')
    .replace(/\s+/g, ' ');

function expectInert(path: string, text: string, calm: string): void {
  if (/\.(h|c|rs)$/.test(path)) {
    expect(text, path).toMatch(/^[\n -~]*$/);
    expect(text, path).not.toMatch(/\?\?|\\$/m);
    expect(code(text), path).toBe(code(calm));
  } else if (path.endsWith('.csv')) {
    expect(text.replace(/^#.*\n/gm, ''), path).toBe(calm.replace(/^#.*\n/gm, ''));
  } else if (path.endsWith('.svg')) {
    expect(xmlFault(text), path).toBeNull();
    const markup = (of: string) =>
      (of.replace(/<!--.*?-->/s, '').match(/<[^>]*>/g) ?? []).map((tag) => tag.split(/[\s>]/)[0]);
    expect(markup(text), path).toEqual(markup(calm));
    expect(text, path).not.toMatch(/<[^>]*\son\w+=/);
  } else if (path.endsWith('.md')) {
    const shape = (of: string) =>
      of
        .split('\n')
        .map((line) => (line.startsWith('|') ? line.match(/\|/g)?.length : /^[#`]*/.exec(line)?.[0].length));
    expect(shape(text).length, path).toBe(shape(calm).length);
    const bare = text
      .split('\n')
      .slice(1)
      .join('\n')
      .replace(/```sh[\s\S]*?```/, '')
      .replace(/`[^`\n]*`/g, '');
    expect(bare, path).not.toMatch(/<|\]\((?!calm\.note\/)|:\/\//);
    expect(bare.replaceAll('\n', ''), path).not.toMatch(hidden);
  } else if (path.endsWith('.json')) JSON.parse(text);
}

const decode = (bytes: Uint8Array) => new TextDecoder().decode(bytes);

describe('a document that was sent', async () => {
  const calm = (await designed(calmNames)).files!;

  it('is designed where its names are calm', () => {
    expect(calm.length).toBeGreaterThan(9);
  });

  for (const field of ['title', 'take', 'file', 'input', 'desired'] as const) {
    it.each(names)(`stays data with %j for its ${field}`, async (name) => {
      const value = field === 'file' ? `${name}.csv` : name;
      const { files, lines } = await designed({ ...calmNames, [field]: value });
      for (const line of lines) {
        expect(line).not.toMatch(hidden);
        expect(line).toMatch(/^calm\S*?\.(pairing\.json|csv)?.*: (error|warning|note): .* \[[\w-]+\]$/);
      }
      if (files === null) {
        expect(lines.length).toBeGreaterThan(0);
        return;
      }
      expect(files.map(({ path }) => path)).toEqual(calm.map(({ path }) => path));
      for (const [i, { path, bytes }] of files.entries())
        expectInert(path, decode(bytes), decode(calm[i].bytes));
    });
  }

  it('takes most of the names, so that these tests look at files', async () => {
    const taken = await Promise.all(
      names.map((name) => designed({ ...calmNames, title: name, input: name })),
    );
    expect(taken.filter(({ files }) => files !== null).length).toBeGreaterThan(names.length / 2);
  });

  it.each(['title', 'take', 'input', 'desired'] as const)(
    'answers a %s of 100,000 characters in lines that can be read',
    async (field) => {
      const { files, lines } = await designed({ ...calmNames, [field]: 'long '.repeat(20_000) });
      expect(files).toBeNull();
      expect(Math.max(...lines.map((line) => line.length))).toBeLessThan(2000);
    },
  );
});

import { existsSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { bundledPackages, notices, readMetafiles } from '../../notices';

// What was built last (`npm test` builds first).

const written = readFileSync('THIRD-PARTY-NOTICES.md', 'utf8');
const packages = bundledPackages(readMetafiles());

describe('the notices', () => {
  it('name every package of which the bundles hold a part, and no other', () => {
    const headings = [...written.matchAll(/^## (\S+) (\S+) \((.*)\)$/gm)].map((found) => found.slice(1));
    expect(headings).toEqual(packages.map(({ name, version, licence }) => [name, version, licence]));
    expect(packages.length).toBeGreaterThan(10);
  });

  it('are those that the licence files make', () => {
    expect(notices(readMetafiles()), 'npm run notices makes them again').toBe(written);
  });

  it('cover every dependency of which code is shipped', () => {
    const { dependencies } = JSON.parse(readFileSync('package.json', 'utf8'));
    const names = packages.map(({ name }) => name);
    expect(Object.keys(dependencies).filter((name) => !names.includes(name))).toEqual([]);
  });

  it('are of licences that may be shipped with a notice alone', () => {
    const fine = ['MIT', 'ISC', '0BSD', 'BSD-2-Clause', 'BSD-3-Clause'];
    expect(packages.filter(({ licence }) => !fine.includes(licence))).toEqual([]);
  });

  it('hold each text that a package brings, in its own words', () => {
    const flat = (text: string) => text.replace(/\s+/g, ' ').trim();
    const texts = packages.flatMap(({ folder }) =>
      ['LICENSE', 'LICENSE.md', 'LICENSE.txt']
        .map((name) => `${folder}/${name}`)
        .filter((path) => existsSync(path)),
    );
    expect(texts.length).toBeGreaterThan(5);
    const all = flat(written);
    expect(texts.filter((path) => !all.includes(flat(readFileSync(path, 'utf8'))))).toEqual([]);
  });

  it('count what the bundles hold bytes of, not what was only read', () => {
    const inputs = { 'node_modules/vitest/none/none.js': { bytesInOutput: 1 } };
    const made = { inputs: {}, outputs: { a: { inputs, bytes: 1, imports: [], exports: [] } } };
    expect(bundledPackages([made]).map(({ name }) => name)).toEqual(['vitest']);
    const unused = { ...made.outputs.a, inputs: { 'node_modules/x/x.js': { bytesInOutput: 0 } } };
    expect(bundledPackages([{ inputs: {}, outputs: { a: unused } }])).toEqual([]);
  });
});

import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { recordingEndings } from '../extension/files/recordingNames';

// The manifest and the code name the same things.

const project = join(__dirname, '..');
const manifest = JSON.parse(readFileSync(join(project, 'package.json'), 'utf8'));
const { commands, customEditors, menus, jsonValidation, configurationDefaults } = manifest.contributes;

/** All sources of the extension, by path. */
function sources(folder: string): string[] {
  return readdirSync(join(project, folder), { recursive: true, encoding: 'utf8' })
    .filter((file) => file.endsWith('.ts'))
    .map((file) => readFileSync(join(project, folder, file), 'utf8'));
}
const code = sources('extension').join('\n');
const named = (pattern: RegExp) => new Set([...code.matchAll(pattern)].map((match) => match[1]));

const commandNames: string[] = commands.map(({ command }: { command: string }) => command);
const viewTypes: string[] = customEditors.map(({ viewType }: { viewType: string }) => viewType);

interface MenuItem {
  command: string;
  when?: string;
}
const menuItems = Object.entries<MenuItem[]>(menus).flatMap(([menu, items]) =>
  items.map((item) => ({ menu, ...item })),
);

/** Context keys of the workbench that clauses may use. */
const contextKeys = [
  'activeCustomEditorId',
  'explorerResourceIsFolder',
  'isInDiffEditor',
  'listDoubleSelection',
  'listMultiSelection',
  'resourceExtname',
  'resourceFilename',
];

describe('the manifest', () => {
  it('names the commands that are registered, each once, all of one category', () => {
    const registered = readFileSync(join(project, 'extension/commands/register.ts'), 'utf8');
    const names = [...registered.matchAll(/^\s+'(tapwright\.\w+)':/gm)].map((match) => match[1]);
    expect(names.sort()).toEqual([...commandNames].sort());
    expect(new Set(commandNames).size).toBe(commandNames.length);
    for (const { category, title } of commands) {
      expect(category).toBe('Tapwright');
      expect(title).not.toBe('');
    }
  });

  it('has every command and view that the code names, and no other', () => {
    const status = 'tapwright.busy';
    const used = named(/['"`](tapwright\.\w+)['"`]/g);
    const known = [...commandNames, ...viewTypes, status];
    expect([...used].filter((name) => !known.includes(name))).toEqual([]);
    expect([...commandNames, ...viewTypes].filter((name) => !used.has(name))).toEqual([]);
  });

  it('has menu entries of its own commands only, none of them twice', () => {
    expect(menuItems.length).toBeGreaterThan(5);
    expect(menuItems.filter(({ command }) => !commandNames.includes(command))).toEqual([]);
    const places = menuItems.map(({ menu, command }) => `${menu} ${command}`);
    expect(new Set(places).size).toBe(places.length);
  });

  it('has clauses of known keys, known views and valid patterns', () => {
    for (const { when, menu } of menuItems) {
      if (menu !== 'commandPalette') expect(when).toBeDefined();
      const bare = (when ?? 'true').replace(/\/(?:[^/\\]|\\.)+\/i?/g, (pattern) => {
        const [, source, flags] = /^\/(.*)\/(i?)$/.exec(pattern)!;
        expect(() => new RegExp(source, flags)).not.toThrow();
        return '';
      });
      for (const [word] of bare.matchAll(/[A-Za-z][\w.]*/g)) {
        expect([...contextKeys, ...viewTypes, 'true', 'false'], `${menu}: ${when}`).toContain(word);
      }
    }
  });

  it('offers an editor for every kind of recording, and takes over only what no other shows', () => {
    const patterns = (priority: string) =>
      customEditors
        .filter((editor: { priority: string }) => editor.priority === priority)
        .flatMap((editor: { selector: { filenamePattern: string }[] }) =>
          editor.selector.map(({ filenamePattern }) => filenamePattern),
        );
    expect(patterns('default').sort()).toEqual(['*.npy', '*.pairing.json']);
    const all = [...patterns('default'), ...patterns('option')].filter((name) => name !== '*.pairing.json');
    expect(all.sort()).toEqual(recordingEndings.map((ending) => `*${ending}`).sort());
    const clause = menuItems.find(
      ({ menu, command }) => menu === 'explorer/context' && command === 'tapwright.pairRecordings',
    )!.when!;
    for (const ending of recordingEndings) expect(clause).toContain(ending.slice(1));
  });

  it('keeps the diffs of version control textual', () => {
    expect(configurationDefaults['workbench.editorAssociations']).toEqual({
      'git:/**/*.pairing.json': 'default',
    });
  });

  it('names files that the build makes or the project holds', () => {
    const build = readFileSync(join(project, 'build.ts'), 'utf8');
    for (const file of [manifest.main, manifest.browser, ...Object.values<string>(manifest.bin)]) {
      expect(build).toContain(/^(?:\.\/)?dist\/(.*)\.js$/.exec(file)![1]);
    }
    for (const { url } of jsonValidation) expect(existsSync(join(project, url))).toBe(true);
  });

  it('has scripts that run scripts and files that are there', () => {
    const scripts: Record<string, string> = manifest.scripts;
    for (const [name, script] of Object.entries(scripts)) {
      for (const [, other] of script.matchAll(/npm run (?:--silent )?([\w-]+)/g)) {
        expect(Object.keys(scripts), `${name} runs ${other}`).toContain(other);
      }
      for (const [file] of script.matchAll(/\b[\w/]+\.ts\b/g)) {
        expect(existsSync(join(project, file)), `${name} needs ${file}`).toBe(true);
      }
    }
  });
});

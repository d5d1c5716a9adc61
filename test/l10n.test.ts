import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { phrases } from '../core/findings/phrases';
import { rowPhrases } from '../core/findings/rowPhrases';
import { placeTemplates } from '../core/findings/say';
import { sentences } from '../core/findings/sentences';
import { stringsIn, translatedIn } from './support/sentences';

// Every sentence that the editor shows has a key, and every key its German.

const project = join(__dirname, '..');
const json = (file: string): Record<string, string> => JSON.parse(readFileSync(join(project, file), 'utf8'));
const manifest = readFileSync(join(project, 'package.json'), 'utf8');
const bundles: string = JSON.parse(manifest).l10n;
const german = json(join(bundles, 'bundle.l10n.de.json'));

const calls = [...translatedIn('webview'), ...translatedIn('extension')];
const ofCore = [
  ...Object.values(sentences).map(({ says }) => says),
  ...Object.values(placeTemplates).filter((template) => template !== placeTemplates.file),
  ...phrases,
  ...rowPhrases,
];
const keys = new Set([...calls.flatMap(({ template }) => template ?? []), ...ofCore]);

/** The names and numbers in braces, each once. */
const places = (text: string) => [...new Set(text.match(/\{\w+\}/g) ?? [])].sort();

describe('sentences that are translated', () => {
  it('are found in the sources', () => {
    expect(calls.length).toBeGreaterThan(400);
  });

  it('stand in the call itself', () => {
    expect(calls.filter(({ template }) => template === null).map(({ at }) => at)).toEqual([]);
  });

  it('have a value for every place, and a place for every value', () => {
    const wrong = calls.filter(({ template, values }) => {
      const wanted = Array.from({ length: values }, (_, i) => `{${i}}`);
      return template !== null && places(template).join() !== wanted.join();
    });
    expect(wrong.map(({ at, template }) => `${at} ${template}`)).toEqual([]);
  });
});

describe('phrases of core', () => {
  // What stands between the places and marks of a phrase; counts are put together of number and noun.
  const words = (text: string) =>
    text
      .split(/\{\d+\}|[.,;](?: |$)| \(/)
      .map((piece) => piece.replace(/^\d+ /, '').trim())
      .filter((piece) => /\p{L}/u.test(piece));
  const made = [...stringsIn('core', /\/(?:phrases|rowPhrases)\.ts$/), ...stringsIn('extension/worker', /^$/)]
    .join('\n')
    .replace(/\{\d+\}/g, '');
  const known = (piece: string) => made.includes(piece) || made.includes(piece.replace(/s$/, ''));

  it('are made there', () => {
    const strange = [...phrases, ...rowPhrases].filter((phrase) => !words(phrase).every(known));
    expect(strange).toEqual([]);
  });

  it('have the numbers of their places in order', () => {
    for (const phrase of [...phrases, ...rowPhrases]) {
      const numbers = [...phrase.matchAll(/\{(\d+)\}/g)].map((match) => Number(match[1]));
      expect(numbers, phrase).toEqual(numbers.map((_, i) => i));
    }
  });
});

describe('the German bundle', () => {
  it('is the only one, and where the manifest says', () => {
    expect(readdirSync(join(project, bundles))).toEqual(['bundle.l10n.de.json']);
  });

  it('has every sentence, and none that is no longer said', () => {
    expect([...keys].filter((key) => !(key in german))).toEqual([]);
    expect(Object.keys(german).filter((key) => !keys.has(key))).toEqual([]);
  });

  it('fills in the same', () => {
    const wrong = Object.entries(german).filter(([key, says]) => places(key).join() !== places(says).join());
    expect(wrong).toEqual([]);
  });

  it('leaves nothing empty, and keeps blanks at the ends', () => {
    const ends = (text: string) => [text.startsWith(' '), text.endsWith(' ')];
    for (const [key, says] of Object.entries(german)) {
      expect(says.trim(), key).not.toBe('');
      expect(ends(says), key).toEqual(ends(key));
    }
  });
});

describe('the texts of the manifest', () => {
  const used = [...manifest.matchAll(/"%([\w.]+)%"/g)].map((match) => match[1]);

  for (const file of ['package.nls.json', 'package.nls.de.json']) {
    it(`are those of ${file}`, () => {
      expect(existsSync(join(project, file))).toBe(true);
      const texts = json(file);
      expect(Object.keys(texts).sort()).toEqual([...new Set(used)].sort());
      expect(Object.values(texts).filter((text) => text.trim() === '')).toEqual([]);
    });
  }

  it('lead to the same commands in German', () => {
    const links = (text: string) => text.match(/\(command:[^)]*\)/g) ?? [];
    const [english, translated] = [json('package.nls.json'), json('package.nls.de.json')];
    for (const key of used) expect(links(translated[key]), key).toEqual(links(english[key]));
  });

  it('are all looked up, but for the name', () => {
    const texts = [...manifest.matchAll(/"(?:title|displayName|description|altText|label)": "([^"]*)"/g)];
    const plain = texts.map((match) => match[1]).filter((text) => !/^%.*%$/.test(text));
    expect(plain.filter((text) => text !== 'Tapwright')).toEqual([JSON.parse(manifest).description]);
  });
});

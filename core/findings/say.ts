import type { Finding, FindingValue } from './finding';
import { fill, type Phrase } from './phrase';
import { sentences } from './sentences';

function show(value: FindingValue): string {
  if (typeof value === 'string') return value;
  return Number.isInteger(value) ? String(value) : String(Number(value.toPrecision(6)));
}

/** The finding's sentence and its values, without its place. */
export function sentenceOf(found: Finding): Phrase {
  const values = Object.entries(found.values).map(([name, value]) => [name, show(value)]);
  return { template: sentences[found.code].says, values: Object.fromEntries(values) };
}

/** The finding's sentence with its values filled in, without its place. */
export function say(found: Finding): string {
  const { template, values } = sentenceOf(found);
  return fill(template, values);
}

/** Characters of a channel's name that a sentence shows: headers know no limit. */
const longestName = 80;

function shortened(name: string): string {
  const characters = [...name.slice(0, 2 * longestName)];
  return characters.length > longestName || name.length > 2 * longestName
    ? `${characters.slice(0, longestName).join('')}…`
    : name;
}

/** Templates of the parts of a place. */
export const placeTemplates = {
  file: '{file}',
  line: 'line {line}',
  take: 'take {take}',
  named: '{take}',
  channel: 'channel {channel}',
  sample: 'sample {from}',
  samples: 'samples {from} to {to}',
} as const;

/** Where a finding is, part by part; none where nothing is known. */
export function placeParts({ file, line, take, channel, from, to }: Finding): Phrase[] {
  const parts: Phrase[] = [];
  const add = (kind: keyof typeof placeTemplates, values: Phrase['values']) =>
    parts.push({ template: placeTemplates[kind], values });
  if (file !== undefined) add('file', { file });
  if (line !== undefined) add('line', { line: `${line}` });
  // Takes that were not named are called "take 1" and so on.
  if (take !== undefined) add(take.startsWith('take ') ? 'named' : 'take', { take });
  if (channel !== undefined) add('channel', { channel: shortened(channel) });
  if (from !== undefined && to === undefined) add('sample', { from: `${from}` });
  if (from !== undefined && to !== undefined) add('samples', { from: `${from}`, to: `${to}` });
  return parts;
}

/** Where a finding is, in words: `slow.csv, channel cell, samples 100 to 140`; empty where nothing is known. */
export function placeInWords(found: Finding): string {
  return placeParts(found)
    .map(({ template, values }) => fill(template, values))
    .join(', ');
}

/** Place and sentence in one line. */
export function sayWithPlace(found: Finding): string {
  const place = placeInWords(found);
  return place === '' ? say(found) : `${place}: ${say(found)}`;
}

import { visible } from '../figures/visible';
import { fill, type Phrase } from './phrase';
import { translatedPhrase } from './translatePhrase';

/** Translations by English template; empty for English. */
export type Dictionary = Readonly<Record<string, string>>;

/** What a view carries of a finding's words. */
interface Worded {
  text: string;
  place: string;
  sentence?: Phrase;
  placeParts?: readonly Phrase[];
}

/** Values that are names of the user's and stay as they are, whatever they say. */
const names = ['cell', 'channel', 'error', 'file', 'key', 'name', 'other'];

/** A finding's sentence in the dictionary's language; English where it has none. */
export function translatedText({ text, sentence }: Worded, dictionary: Dictionary): string {
  if (sentence === undefined || !(sentence.template in dictionary)) return text;
  const values = Object.entries(sentence.values).map(([name, value]) => [
    name,
    names.includes(name) ? value : translatedPhrase(value, dictionary),
  ]);
  return visible(fill(dictionary[sentence.template], Object.fromEntries(values)));
}

/** Where a finding is, in the dictionary's language. */
export function translatedPlace({ place, placeParts }: Worded, dictionary: Dictionary): string {
  if (placeParts === undefined) return place;
  const parts = placeParts.map(({ template, values }) => fill(dictionary[template] ?? template, values));
  return visible(parts.join(', '));
}

/** Place and sentence in one line, in the dictionary's language. */
export function translatedLine(found: Worded, dictionary: Dictionary): string {
  const place = translatedPlace(found, dictionary);
  const text = translatedText(found, dictionary);
  return place === '' ? text : `${place}: ${text}`;
}

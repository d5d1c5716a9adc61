import { translatedPlace, translatedText } from '../core/findings/translate';
import { translatedPhrase } from '../core/findings/translatePhrase';
import type { FindingView } from '../core/protocol/views';

let dictionary: Record<string, string> = {};

/** Sets the translations, by English template; empty for English. */
export function setWords(words: Record<string, string>): void {
  dictionary = words;
}

/** A sentence in the user's language: `t('{0} of {1} files', 2, 3)`. */
export function t(template: string, ...values: (string | number)[]): string {
  const text = dictionary[template] ?? template;
  return text.replace(/\{(\d+)\}/g, (whole, place: string) => String(values[Number(place)] ?? whole));
}

/** A finding's sentence in the user's language. */
export function textOf(found: FindingView): string {
  return translatedText(found, dictionary);
}

/** Where a finding is, in the user's language; empty where nothing is known. */
export function placeOf(found: FindingView): string {
  return translatedPlace(found, dictionary);
}

/** What `core` has put together in words, in the user's language as far as it is known. */
export function phrase(text: string): string {
  return translatedPhrase(text, dictionary);
}

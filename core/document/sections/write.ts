import type { At, Check } from '../checks/check';
import { describe } from '../checks/describe';
import type { Keys } from '../checks/keys';
import { distinct, listOf } from '../checks/lists';
import { wholeIn } from '../checks/numbers';
import { folderPath } from '../checks/relativePath';
import { oneOf, text } from '../checks/texts';
import { type Language, languages, orders, type PairingDocument } from '../pairingDocument';
import { defaultSymbol, longestSymbol, symbolFault } from '../symbol';
import { attributes } from './attributes';

/** Samples of the test vectors at most. */
const longestVectors = 65_536;

/** The files that are written. */
export function write(title: string): (keys: Keys) => PairingDocument['write'] {
  return (keys) => ({
    folder: keys.optional('folder', folderPath, 'generated'),
    symbol: keys.optional('symbol', symbol, defaultSymbol(title)),
    languages: keys.optional('languages', languageSet, ['c']),
    order: keys.optional('order', oneOf(orders), 'newest-first'),
    attributes: keys.section('attributes', attributes),
    testVectors: keys.optional('testVectors', wholeIn(0, longestVectors), 256),
  });
}

const symbolCodes = {
  form: 'symbol-form',
  long: 'symbol-too-long',
  keyword: 'symbol-keyword',
  reserved: 'symbol-reserved',
} as const;

function symbol(value: unknown, at: At): string | undefined {
  const name = text(value, at);
  if (name === undefined) return undefined;
  const fault = symbolFault(name);
  return fault === null ? name : at.report(symbolCodes[fault], { got: describe(name), max: longestSymbol });
}

const languageList = distinct(listOf(oneOf(languages), 1, languages.length));

/** In the order of the table, since the order in the document means nothing. */
const languageSet: Check<Language[]> = (value, at) => {
  const listed = languageList(value, at);
  return listed && languages.filter((language) => listed.includes(language));
};

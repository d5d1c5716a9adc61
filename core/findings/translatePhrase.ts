import { fill } from './phrase';
import { phrases } from './phrases';
import { rowPhrases } from './rowPhrases';

const exact = new Set([...phrases, ...rowPhrases]);

/** With fewer letters than this between its places a phrase is only known where what stands there is. */
const telling = 5;

/** Phrases within phrases: deeper ones are left as they are. */
const deepest = 4;

/** Characters of a text that is looked up: twice what the longest comes to. */
const longest = 2000;

interface Pattern {
  phrase: string;
  matches: RegExp;
  /** Too short to be known by itself. */
  weak: boolean;
}

let made: Pattern[] | null = null;

/** Longest words first. */
function patterns(): Pattern[] {
  made ??= [...exact]
    .filter((phrase) => phrase.includes('{0}'))
    .map((phrase) => ({ phrase, letters: lettersOf(phrase) }))
    .sort((a, b) => b.letters - a.letters)
    .map(({ phrase, letters }) => ({ phrase, matches: patternOf(phrase), weak: letters < telling }));
  return made;
}

function patternOf(phrase: string): RegExp {
  const pieces = phrase.split(/\{\d\}/).map((piece) => piece.replace(/[\\^$.*+?()[\]{}|]/g, '\\$&'));
  return new RegExp(`^${pieces.join('(.+?)')}$`, 'su');
}

function lettersOf(text: string): number {
  return text.replace(/\P{L}/gu, '').length;
}

/** A text in the dictionary's language, and how many of its letters are left as they were. */
interface Known {
  says: string;
  left: number;
}

/**
 * A text that `core` has put together in English, in the dictionary's language: known by the table of phrases. What
 * stands in a phrase is looked up likewise, and of several ways to read a text the one that leaves the fewest letters is
 * taken; what is not known stays as it is.
 */
export function translatedPhrase(text: string, dictionary: Readonly<Record<string, string>>): string {
  const bare = text.trim();
  const known = new Reader(dictionary).read(bare, 0);
  return known === null ? text : text.replace(bare, () => known.says);
}

class Reader {
  private readonly seen = new Map<string, Known | null>();

  constructor(private readonly dictionary: Readonly<Record<string, string>>) {}

  /** Null where the text is not known. */
  read(text: string, depth: number): Known | null {
    if (exact.has(text)) {
      const says = this.dictionary[text];
      return says === undefined ? null : { says, left: 0 };
    }
    if (depth === deepest || text.length > longest) return null;
    const key = `${depth} ${text}`;
    let known = this.seen.get(key);
    if (known === undefined) {
      const ways = [this.list(text, depth), ...patterns().map((pattern) => this.match(pattern, text, depth))];
      known = ways.reduce(
        (best, way) => (way !== null && (best === null || way.left < best.left) ? way : best),
        null,
      );
      this.seen.set(key, known);
    }
    return known;
  }

  private match({ phrase, matches, weak }: Pattern, text: string, depth: number): Known | null {
    const says = this.dictionary[phrase];
    const match = says === undefined ? null : matches.exec(text);
    if (match === null) return null;
    const parts = match.slice(1);
    const inside = parts.map((part) => this.read(part, depth + 1));
    if (weak && parts.some((part, i) => inside[i] === null && !isFigure(part))) return null;
    // The places of a phrase are numbered in the order in which it has them.
    const values = Object.fromEntries(parts.map((part, i) => [i, inside[i]?.says ?? part]));
    return { says: fill(says, values), left: leftOf(parts, inside) };
  }

  /** Items between semicolons or commas, of which one at least is known, and the others are figures. */
  private list(text: string, depth: number): Known | null {
    const separator = ['; ', ', '].find((one) => text.includes(one));
    if (separator === undefined) return null;
    const items = text.split(separator);
    const inside = items.map((item) => this.read(item, depth + 1));
    if (inside.every((one) => one === null)) return null;
    if (items.some((item, i) => inside[i] === null && !isFigure(item))) return null;
    return {
      says: items.map((item, i) => inside[i]?.says ?? item).join(separator),
      left: leftOf(items, inside),
    };
  }
}

function leftOf(parts: readonly string[], inside: readonly (Known | null)[]): number {
  return parts.reduce((sum, part, i) => sum + (inside[i]?.left ?? lettersOf(part)), 0);
}

function isFigure(text: string): boolean {
  return /^[-−±∞–"'\d]/.test(text.trim());
}

import { type Finding, Refusal } from '../../../core/findings/finding';
import { problemLine } from '../../../core/findings/problemLine';
import { say, sayWithPlace } from '../../../core/findings/say';
import { sentences } from '../../../core/findings/sentences';

/** Characters of a sentence at most, so that no finding repeats a whole file. */
const longestSentence = 1500;

/** What figures are shown as that are no numbers. */
const noFigure = '–';

/** What a value that was never given looks like in a sentence. */
const slips = /undefined|NaN|\[object/g;

/**
 * Throws where a finding cannot be told: a value of its sentence is missing or no number, the sentence is endless, its
 * line for a terminal is not one line, or its place is none.
 * @param bytes of the input, which a sentence may quote
 * @param text of the document, where the input is one
 */
export function checkFindings(findings: readonly Finding[], bytes: Uint8Array, text: string | null): void {
  const lines = text === null ? null : text.split(/\r\n|\n|\r/);
  for (const found of findings) {
    const fault = faultOf(found, bytes, text, lines);
    if (fault !== null) throw new Error(`${found.code}: ${fault}`);
  }
}

function faultOf(
  found: Finding,
  bytes: Uint8Array,
  text: string | null,
  lines: readonly string[] | null,
): string | null {
  for (const [, name] of sentences[found.code].says.matchAll(/\{(\w+)\}/g)) {
    if (!Object.hasOwn(found.values, name)) return `no value for {${name}}`;
  }
  for (const [name, value] of Object.entries(found.values)) {
    if (typeof value === 'number' ? !Number.isFinite(value) : typeof value !== 'string')
      return `{${name}} is ${value}`;
  }
  if (Object.values(found.values).includes(noFigure)) return `a figure that is none in "${say(found)}"`;
  const said = sayWithPlace(found);
  if (said.length > longestSentence) return `a sentence of ${said.length} characters`;
  const slip = [...say(found).matchAll(slips)].find(([word]) => !isQuoted(word, found, bytes));
  if (slip !== undefined) return `"${slip[0]}" in "${said}"`;
  if (!(found.from === undefined || (found.from >= 0 && (found.to === undefined || found.to > found.from)))) {
    return `samples ${found.from} to ${found.to}`;
  }
  const line = problemLine(found, 'x.pairing.json', text);
  const place = /^[^:]*:([1-9]\d*):([1-9]\d*): (?:error|warning|note): .+ \[[\w-]+\]$/.exec(line);
  if (place === null || /[\p{Cc}\p{Cs}\p{Zl}\p{Zp}]/u.test(line))
    return `not one line: ${JSON.stringify(line)}`;
  return lines === null ? null : placeFault(lines, Number(place[1]), Number(place[2]));
}

/** Whether a word stands in the sentence of all findings of this code, or in the file. */
function isQuoted(word: string, { code }: Finding, bytes: Uint8Array): boolean {
  const file = Buffer.from(bytes).toString('latin1').replaceAll('\0', '');
  return sentences[code].says.includes(word) || file.includes(word);
}

function placeFault(lines: readonly string[], line: number, column: number): string | null {
  const there = line <= lines.length && column <= lines[line - 1].length + 1;
  return there ? null : `line ${line}, column ${column} of a text of ${lines.length} lines`;
}

/** The findings of a refusal; anything else that is thrown is a bug and is thrown on. */
export function refusalFindings(error: unknown): readonly Finding[] {
  if (error instanceof Refusal) return error.findings;
  throw error;
}

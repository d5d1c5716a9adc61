import { createScanner, getNodeValue, type Node, parseTree, printParseErrorCode } from 'jsonc-parser';
import { visible } from '../figures/visible';
import { type Finding, finding } from '../findings/finding';
import { pathInWords } from './checks/path';
import { duplicateKeys } from './duplicateKeys';
import { positionAt } from './position';

/** Bytes of a document at most. */
export const largestDocument = 4 * 1024 * 1024;

/** Lists and objects inside each other at most; the parser calls itself for each. */
const deepestNesting = 64;

/** Broken places told at most: what follows the first few is often but their consequence. */
const mostBroken = 5;

/** Repeated keys told at most. */
const mostRepeated = 20;

export interface ParsedJson {
  /** The text's value, its objects without a prototype; undefined where it could not be parsed. */
  value: unknown;
  /** The same with offsets. */
  root: Node | undefined;
  /** Blockers only. */
  findings: Finding[];
}

/** Parses strict JSON (RFC 8259). A byte order mark before it is passed over. */
export function parseJson(text: string): ParsedJson {
  const size = text.length > largestDocument ? text.length : new TextEncoder().encode(text).length;
  if (size > largestDocument) {
    return failed(finding('document-too-large', { size, limit: largestDocument }, { path: [] }));
  }
  const bare = text.startsWith('\ufeff') ? ` ${text.slice(1)}` : text;
  if (tooDeep(bare)) return failed(finding('document-too-deep', { max: deepestNesting }, { path: [] }));
  const errors: Parameters<typeof parseTree>[1] = [];
  const root = parseTree(bare, errors, { disallowComments: true, allowTrailingComma: false });
  if (root === undefined || errors.length > 0) return failed(...brokenPlaces(bare, errors));
  const findings = duplicateKeys(root)
    .slice(0, mostRepeated)
    .map(({ path, offset }) =>
      finding('duplicate-key', { key: pathInWords(path), ...positionAt(bare, offset) }, { path }),
    );
  return { value: getNodeValue(root), root, findings };
}

function failed(...findings: Finding[]): ParsedJson {
  return { value: undefined, root: undefined, findings };
}

/** Read with the parser's own scanner, so that both agree on what is text and what is a bracket. */
function tooDeep(text: string): boolean {
  const scanner = createScanner(text, true);
  let depth = 0;
  for (;;) {
    scanner.scan();
    const offset = scanner.getTokenOffset();
    if (offset >= text.length) return false;
    const first = text[offset];
    if (first === '{' || first === '[') depth++;
    if (first === '}' || first === ']') depth--;
    if (depth > deepestNesting) return true;
  }
}

type Broken = { error: Parameters<typeof printParseErrorCode>[0]; offset: number; length: number };

/** The first complaint of each line: the parser goes on after one, and others about the same place follow. */
function brokenPlaces(text: string, errors: readonly Broken[]): Finding[] {
  const byLine = new Map<number, Finding>();
  for (const { error, offset, length } of errors.slice(0, 10 * mostBroken)) {
    const position = positionAt(text, offset);
    if (byLine.has(position.line)) continue;
    const found =
      offset < text.length
        ? inWords(text.slice(offset, offset + Math.max(length, 1)))
        : 'the end of the file';
    const values = { ...position, found, expected: expectations[printParseErrorCode(error)] };
    byLine.set(position.line, finding('broken-json', values, { path: [] }));
    if (byLine.size === mostBroken) break;
  }
  return [...byLine.values()];
}

function inWords(token: string): string {
  return token.length > 30 ? `${visible(token.slice(0, 30))}…` : visible(token);
}

const expectations: Record<string, string> = {
  InvalidSymbol: 'a value, a comma or a bracket of JSON',
  InvalidNumberFormat: 'a number as JSON writes it',
  PropertyNameExpected: 'a key in double quotes',
  ValueExpected: 'a value',
  ColonExpected: 'a colon',
  CommaExpected: 'a comma',
  CloseBraceExpected: 'a closing brace',
  CloseBracketExpected: 'a closing bracket',
  EndOfFileExpected: 'the end of the file',
  InvalidCommentToken: 'no comment',
  UnexpectedEndOfComment: 'no comment',
  UnexpectedEndOfString: 'a closing double quote on the same line',
  UnexpectedEndOfNumber: 'a digit',
  InvalidUnicode: 'four hexadecimal digits after \\u',
  InvalidEscapeCharacter: 'one of " \\ / b f n r t u after a backslash',
  InvalidCharacter: 'text without control characters (a tab is \\t)',
};

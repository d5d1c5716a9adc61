import { type NewSha256, sha256OfText } from '../bytes/sha256';
import { unicodeEscape } from '../figures/visible';

/** What a written file says about its origin. */
export interface Mark {
  /** File name of the pairing document. */
  document: string;
  /** SHA-256 over what the file was made from: see {@link madeFromDigest}. */
  digest: string;
}

/** How the languages that are written open and close a one-line comment. */
const comments = {
  c: ['/* ', ' */'],
  rust: ['// ', ''],
  hash: ['# ', ''],
  markup: ['<!-- ', ' -->'],
} as const;

export type MarkStyle = keyof typeof comments;

const pattern = /by Tapwright from (.+?); do not edit; made from sha256 ([0-9a-f]{64})/;
// An NPY file begins with six bytes of magic, and its first line is a Python literal that a comment may end.
const line = new RegExp(`^\\uFEFF?(?:/\\*|//|#|<!--|[^\\n]?NUMPY[^\\n]*#) ?generated ${pattern.source}`);
const whole = new RegExp(`^${pattern.source}`);
const firstKey = /^\uFEFF?\s*\{\s*"generated"\s*:\s*("(?:[^"\\]|\\.)*")/;

/**
 * One SHA-256 over the document's digest and those of the recordings, one a line, in the order given.
 * @param documentSha256 of the document's meaning
 * @param recordingSha256s of the recordings' bytes, in the order in which the document first names them
 */
export function madeFromDigest(
  newSha256: NewSha256,
  documentSha256: string,
  recordingSha256s: readonly string[],
): string {
  return sha256OfText(newSha256, `${[documentSha256, ...recordingSha256s].join('\n')}\n`);
}

/** The mark's text, as the value of the key `generated` and, after that word, in comments. ASCII only. */
export function markText({ document, digest }: Mark): string {
  // No name may close a comment of any language, nor be mistaken for the text around it.
  const name = document.replace(/[^A-Za-z0-9 ._+,()@=-]|-(?=-)|(?<=-)-/gu, unicodeEscape);
  return `by Tapwright from ${name}; do not edit; made from sha256 ${digest}`;
}

/** The first line of a written file, without its line end. */
export function markLine(mark: Mark, style: MarkStyle): string {
  const [open, close] = comments[style];
  return `${open}generated ${markText(mark)}${close}`;
}

/**
 * The mark of a file that was written earlier, from its first line or, in JSON, its first key; null for any other file.
 * @param text of the file, or as much of its start as holds the first line
 */
export function readMark(text: string): Mark | null {
  const match = line.exec(text) ?? whole.exec(valueOfFirstKey(text));
  if (match === null) return null;
  const document = match[1].replace(/\\u([0-9a-f]{4})/g, (_, hex: string) =>
    String.fromCharCode(Number.parseInt(hex, 16)),
  );
  return { document, digest: match[2] };
}

function valueOfFirstKey(text: string): string {
  const match = firstKey.exec(text);
  if (match === null) return '';
  try {
    return JSON.parse(match[1]);
  } catch {
    return '';
  }
}

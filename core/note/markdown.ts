import { visible } from '../figures/visible';

// What can open or close something in CommonMark and its tables, strikethrough and formula extensions; an underscore
// inside a word cannot. The last two keep addresses from becoming links.
const active = /[\\`*[\]<>&|~#$]|(?<![A-Za-z0-9])_|_(?![A-Za-z0-9])|:(?=\/\/)|(?<=www)\./gi;

/**
 * Text from a document as plain Markdown text, one line. Numeric character references stand for what would be markup: unlike
 * backslashes they mean the same in every place and dialect.
 */
export function plain(text: string): string {
  return visible(text).replace(active, (character) => `&#${character.charCodeAt(0)};`);
}

/**
 * A name (file, channel, take) set as code, or as plain text where code could not hold it: in tables, dialects differ about
 * bars and backslashes in code.
 */
export function name(text: string): string {
  const seen = visible(text);
  if (seen === '') return '(no name)';
  return /[`|\\]|^\s|\s$/.test(seen) ? plain(seen) : `\`${seen}\``;
}

/** Our own formula or command, without backquotes or bars, set as code. */
export function code(text: string): string {
  return `\`${text}\``;
}

/** The path of a file as the target of a link. */
export function target(path: string): string {
  return path
    .replace(/\p{Surrogate}/gu, '\ufffd')
    .split('/')
    .map((part) =>
      encodeURIComponent(part).replace(/[!'()*]/g, (c) => `%${c.charCodeAt(0).toString(16).toUpperCase()}`),
    )
    .join('/');
}

/**
 * A table of cells that are Markdown already. Columns named in `right` are set to the right, as figures are.
 */
export function table(
  head: readonly string[],
  rows: readonly (readonly string[])[],
  right: readonly string[] = [],
): string {
  const row = (cells: readonly string[]) => `| ${cells.join(' | ')} |`;
  return [
    row(head),
    row(head.map((title) => (right.includes(title) ? '--:' : '---'))),
    ...rows.map(row),
  ].join('\n');
}

/** A numbered list; each item is one paragraph of Markdown. */
export function steps(items: readonly string[]): string {
  return items.map((item, i) => `${i + 1}. ${item}`).join('\n');
}

/** A list; each item is one paragraph of Markdown. */
export function bullets(items: readonly string[]): string {
  return items.map((item) => `- ${item}`).join('\n');
}

/** A section under its heading; parts that are empty are left out. */
export function section(title: string, ...parts: string[]): string {
  return [`## ${title}`, ...parts.filter((part) => part !== '')].join('\n\n');
}

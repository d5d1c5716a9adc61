/** How a JSON text is laid out. */
export interface TextStyle {
  /** One level. */
  indent: string;
  eol: '\n' | '\r\n';
}

/** Characters of a line that a value may fill before it is laid out in several. */
const width = 110;

/** From the text's first line break and the first line that is indented; two spaces and LF where there is none. */
export function styleOf(text: string): TextStyle {
  const indent = /(?:^|[\r\n])([ \t]+)(?=["{[\d])/.exec(text)?.[1] ?? '  ';
  const eol = /\r\n|\n/.exec(text)?.[0] === '\r\n' ? '\r\n' : '\n';
  return { indent, eol };
}

/**
 * A value as JSON text, on one line where it fits or where its surroundings stand on one.
 * @param lead indent of the line where the value begins
 * @param used characters that stand before it on that line
 */
export function rendered(
  value: unknown,
  { indent, eol }: TextStyle,
  lead: string,
  used: number,
  oneLine = false,
): string {
  const short = onOneLine(value);
  const brackets = Array.isArray(value) ? '[]' : '{}';
  const items = itemsOf(value);
  if (oneLine || items.length === 0 || used + short.length < width) return short;
  const deeper = lead + indent;
  const lines = items.map(([key, item]) => {
    const name = key === null ? '' : `${JSON.stringify(key)}: `;
    return deeper + name + rendered(item, { indent, eol }, deeper, deeper.length + name.length);
  });
  return brackets[0] + eol + lines.join(`,${eol}`) + eol + lead + brackets[1];
}

function onOneLine(value: unknown): string {
  const items = itemsOf(value);
  if (Array.isArray(value)) return `[${items.map(([, item]) => onOneLine(item)).join(', ')}]`;
  if (typeof value !== 'object' || value === null) return JSON.stringify(value);
  const texts = items.map(([key, item]) => `${JSON.stringify(key)}: ${onOneLine(item)}`);
  return texts.length === 0 ? '{}' : `{ ${texts.join(', ')} }`;
}

/** Entries of an object, members of a list without keys; nothing for other values. */
function itemsOf(value: unknown): [string | null, unknown][] {
  if (Array.isArray(value)) return value.map((item) => [null, item]);
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).filter(([, item]) => item !== undefined);
}

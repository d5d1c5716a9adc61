export type Json = null | boolean | number | string | Json[] | { [key: string]: Json };

const width = 110;

/**
 * JSON for people: two spaces a level, LF; what fits a line of 110 characters stands on one, and longer arrays of numbers
 * or strings fill such lines. Numbers are written shortest so that they read back exactly; those that are not finite become null.
 */
export function jsonText(value: { [key: string]: Json }): string {
  const lines = Object.entries(value).map(
    ([key, item]) => `  ${JSON.stringify(key)}: ${laid(item, 2, key.length + 4)}`,
  );
  return `{\n${lines.join(',\n')}\n}\n`;
}

/** @param used characters of the line before the value, its indent not counted */
function laid(value: Json, indent: number, used: number): string {
  const short = onOneLine(value);
  // One more for the comma that may follow.
  if (value === null || typeof value !== 'object' || indent + used + short.length < width) return short;
  const pad = ' '.repeat(indent + 2);
  const end = ' '.repeat(indent);
  if (!Array.isArray(value)) {
    const items = Object.entries(value).map(
      ([key, item]) => `${pad}${JSON.stringify(key)}: ${laid(item, indent + 2, key.length + 4)}`,
    );
    return `{\n${items.join(',\n')}\n${end}}`;
  }
  if (value.some((item) => item !== null && typeof item === 'object')) {
    return `[\n${value.map((item) => pad + laid(item, indent + 2, 0)).join(',\n')}\n${end}]`;
  }
  return `[\n${filled(value.map(onOneLine), pad)}\n${end}]`;
}

function onOneLine(value: Json): string {
  if (value === null || typeof value !== 'object') {
    return JSON.stringify(typeof value === 'number' && value === 0 ? 0 : value);
  }
  if (Array.isArray(value)) return `[${value.map(onOneLine).join(', ')}]`;
  const items = Object.entries(value).map(([key, item]) => `${JSON.stringify(key)}: ${onOneLine(item)}`);
  return items.length === 0 ? '{}' : `{ ${items.join(', ')} }`;
}

function filled(items: readonly string[], pad: string): string {
  const lines: string[] = [];
  let current = '';
  items.forEach((item, i) => {
    const text = i < items.length - 1 ? `${item},` : item;
    if (current !== '' && pad.length + current.length + 1 + text.length > width) {
      lines.push(pad + current);
      current = text;
    } else {
      current += current === '' ? text : ` ${text}`;
    }
  });
  return [...lines, pad + current].join('\n');
}

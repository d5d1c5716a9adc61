const name = '[A-Za-z_][\\w:.-]*';
const attributes = `(?:\\s+${name}="[^"<]*")*`;
const token = new RegExp(
  `<!--(?:(?!--)[\\s\\S])*-->|<(${name})${attributes}\\s*(/?)>|</(${name})\\s*>|[^<>]+`,
  'y',
);
const entity = /&(?!(?:amp|lt|gt|quot|apos|#\d+|#x[\da-f]+);)/i;
// XML 1.0, production 2.
const forbidden = /[^\t\n\r\u0020-\uD7FF\uE000-\uFFFD\u{10000}-\u{10FFFF}]/u;

/** What keeps a text from being well-formed XML 1.0 (of the plain sort that the pictures are), or null. */
export function xmlFault(text: string): string | null {
  if (forbidden.test(text)) return 'a character that XML does not allow';
  if (entity.test(text)) return 'an ampersand that starts no reference';
  const open: string[] = [];
  let roots = 0;
  token.lastIndex = 0;
  while (token.lastIndex < text.length) {
    const at = token.lastIndex;
    const match = token.exec(text);
    if (match === null) return `no markup at ${at}: ${text.slice(at, at + 40)}`;
    const [whole, opened, empty, closed] = match;
    if (opened !== undefined) {
      if (open.length === 0) roots++;
      if (empty === '') open.push(opened);
    } else if (closed !== undefined) {
      if (open.pop() !== closed) return `</${closed}> closes another element`;
    } else if (open.length === 0 && !whole.startsWith('<!--') && whole.trim() !== '') {
      return `text outside the root element: ${whole}`;
    }
  }
  if (open.length > 0) return `<${open.pop()}> is not closed`;
  return roots === 1 ? null : `${roots} root elements`;
}

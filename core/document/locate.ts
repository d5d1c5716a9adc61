import type { Node } from 'jsonc-parser';
import type { Finding } from '../findings/finding';
import type { Path } from './checks/path';
import { parseJson } from './parseJson';
import { type Position, positionAt } from './position';

/**
 * Where the document has the value at the path, or where it is left out its deepest parent that is there.
 * @param offset the place to give where the text is no JSON
 */
export function locate(text: string, path: Path, offset = 0): Position {
  let node = rootOf(text);
  if (node === undefined) return positionAt(text, offset);
  for (const key of path) {
    const child = childOf(node, key);
    if (child === undefined) break;
    node = child;
  }
  return positionAt(text, node.offset);
}

/** The text parsed last: all findings of a document are located in the same one. */
let last: { text: string; root: Node | undefined } = { text: '', root: undefined };

function rootOf(text: string): Node | undefined {
  if (text !== last.text) last = { text, root: parseJson(text).root };
  return last.root;
}

/** Where a finding of this document is: broken JSON and repeated keys bring their place with them. */
export function locateFinding(text: string, { values, path }: Finding): Position {
  const { line, column } = values;
  return typeof line === 'number' && typeof column === 'number' ? { line, column } : locate(text, path ?? []);
}

/** The value that a key of a parsed text leads to; undefined where there is none. */
export function childOf(node: Node, key: string | number): Node | undefined {
  if (node.type === 'array') return typeof key === 'number' ? node.children?.[key] : undefined;
  if (node.type !== 'object') return undefined;
  return node.children?.find((property) => property.children?.[0].value === key)?.children?.[1];
}

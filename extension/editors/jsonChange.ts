import { getNodeValue, type Node, parseTree } from 'jsonc-parser';
import { childOf } from '../../core/document/locate';
import type { Change } from '../../core/protocol/messages';
import { rendered, type TextStyle } from './textStyle';

/** A stretch of a text and what takes its place. */
export interface TextChange {
  offset: number;
  length: number;
  text: string;
}

/**
 * The one edit that makes a change, or null where the text says so already. Nothing but the value, its key and the comma
 * beside it is touched: `modify` of jsonc-parser would lay out the whole line again, and lines of these documents hold
 * whole objects.
 * @param text valid JSON
 */
export function jsonChange(text: string, { path, value }: Change, style: TextStyle): TextChange | null {
  const root = parseTree(text);
  if (root === undefined) throw new Error('the text is no JSON');
  let node = root;
  for (const [depth, key] of path.entries()) {
    const child = childOf(node, key);
    if (child === undefined) {
      if (value === undefined) return null;
      return put(text, node, path.slice(depth), value, style);
    }
    node = child;
  }
  if (value === undefined) return node === root ? null : takeOut(text, node);
  return same(getNodeValue(node), value) ? null : replace(text, node, value, style);
}

/** Sets what is not there, with the parents that are missing. */
function put(
  text: string,
  parent: Node,
  [key, ...rest]: Change['path'],
  value: unknown,
  style: TextStyle,
): TextChange {
  const inner = rest.reduceRight<unknown>(
    (made, part) => (typeof part === 'number' ? [made] : { [part]: made }),
    value,
  );
  const isList = parent.type === 'array' && typeof key === 'number';
  const isObject = parent.type === 'object' && typeof key === 'string';
  // A parent that is no object (`null`, say) gives way to one that holds the value.
  if (!isList && !isObject)
    return replace(text, parent, typeof key === 'number' ? [inner] : { [key]: inner }, style);
  const last = parent.children?.at(-1);
  if (last === undefined) return replace(text, parent, isList ? [inner] : { [key]: inner }, style);
  const name = isList ? '' : `${JSON.stringify(key)}: `;
  const end = last.offset + last.length;
  const lead = ownLine(text, last.offset);
  if (lead === null)
    return { offset: end, length: 0, text: `, ${name}${rendered(inner, style, '', 0, true)}` };
  const laid = rendered(inner, style, lead, lead.length + name.length);
  return { offset: end, length: 0, text: `,${style.eol}${lead}${name}${laid}` };
}

function replace(text: string, node: Node, value: unknown, style: TextStyle): TextChange {
  const start = text.lastIndexOf('\n', node.offset - 1) + 1;
  const lead = /^[ \t]*/.exec(text.slice(start, node.offset))?.[0] ?? '';
  const laid = rendered(value, style, lead, node.offset - start);
  return { offset: node.offset, length: node.length, text: laid };
}

/** Takes a member out with the comma and the blanks that belong to it. */
function takeOut(text: string, value: Node): TextChange {
  const member = value.parent?.type === 'property' ? value.parent : value;
  const parent = member.parent!;
  const siblings = parent.children!;
  const place = siblings.indexOf(member);
  const end = member.offset + member.length;
  if (place > 0) {
    const before = siblings[place - 1].offset + siblings[place - 1].length;
    return { offset: before, length: end - before, text: '' };
  }
  if (siblings.length > 1) {
    return { offset: member.offset, length: siblings[1].offset - member.offset, text: '' };
  }
  const isBlank = /^\s*$/.test(text.slice(parent.offset + 1, member.offset));
  const from = isBlank ? parent.offset + 1 : member.offset;
  return { offset: from, length: parent.offset + parent.length - 1 - from, text: '' };
}

/** The blanks before a member that begins its line; null where something else stands before it. */
function ownLine(text: string, offset: number): string | null {
  const start = Math.max(text.lastIndexOf('\n', offset - 1), text.lastIndexOf('\r', offset - 1)) + 1;
  const before = text.slice(start, offset);
  return start > 0 && /^[ \t]*$/.test(before) ? before : null;
}

function same(a: unknown, b: unknown): boolean {
  return JSON.stringify(a) === JSON.stringify(b);
}

import type { At } from '../checks/check';
import { describe } from '../checks/describe';
import type { Keys } from '../checks/keys';
import type { PairingDocument } from '../pairingDocument';

/** Characters of an attribute at most. */
const longestAttribute = 200;

// No character that could end a declaration, open a comment, a line or a trigraph.
const allowed = /^[A-Za-z0-9_ ()[\],.:=+<>#"-]*$/;

/** Alignment and section attributes of the coefficient arrays, as free text of checked characters. */
export function attributes(keys: Keys): PairingDocument['write']['attributes'] {
  return {
    cBefore: keys.optional('cBefore', attribute, ''),
    cAfter: keys.optional('cAfter', attribute, ''),
    rust: keys.optional('rust', rustAttribute, ''),
  };
}

function attribute(value: unknown, at: At): string | undefined {
  if (typeof value !== 'string') return at.report('not-text', { got: describe(value) });
  if (value.length > longestAttribute)
    return at.report('text-too-long', { got: value.length, max: longestAttribute });
  if (!allowed.test(value) || !balanced(value) || value.includes('??')) {
    return at.report('attribute-form', { got: describe(value) });
  }
  return value.trim();
}

function rustAttribute(value: unknown, at: At): string | undefined {
  const text = attribute(value, at);
  if (text === undefined || /^(#\[[^[\]]*\] *)*$/.test(text)) return text;
  return at.report('attribute-form', { got: describe(value) });
}

/** Quotes in pairs, and brackets closed in the order they were opened, outside quotes. */
function balanced(text: string): boolean {
  const open: string[] = [];
  const bare = text.replace(/"[^"]*"/g, '');
  if (bare.includes('"')) return false;
  for (const character of bare) {
    if (character === '(') open.push(')');
    else if (character === '[') open.push(']');
    else if ((character === ')' || character === ']') && open.pop() !== character) return false;
  }
  return open.length === 0;
}

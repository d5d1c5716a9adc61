import type { Node } from 'jsonc-parser';

/** A key that its object has already. */
export interface DuplicateKey {
  path: (string | number)[];
  offset: number;
}

/** Every repetition of a key: which of the values counts would be a matter of the parser (RFC 8259, 4). */
export function duplicateKeys(node: Node, path: readonly (string | number)[] = []): DuplicateKey[] {
  if (node.type === 'array') {
    return (node.children ?? []).flatMap((child, index) => duplicateKeys(child, [...path, index]));
  }
  if (node.type !== 'object') return [];
  const seen = new Set<string>();
  return (node.children ?? []).flatMap((property) => {
    const [key, value] = property.children ?? [];
    const inside = [...path, key.value as string];
    const repeated = seen.has(key.value) ? [{ path: inside, offset: key.offset }] : [];
    seen.add(key.value);
    return [...repeated, ...duplicateKeys(value, inside)];
  });
}

/** A JSON text's value with whatever a text can say and a value cannot: repeated keys, numbers as written, no JSON at all. */
export type Tree = { raw: string } | { items: Tree[] } | { pairs: [key: string, value: Tree][] };

export function treeOf(value: unknown): Tree {
  if (Array.isArray(value)) return { items: value.map(treeOf) };
  if (typeof value === 'object' && value !== null)
    return { pairs: Object.entries(value).map(([key, entry]) => [key, treeOf(entry)]) };
  return { raw: JSON.stringify(value) };
}

/** @param gap between tokens */
export function textOf(tree: Tree, gap: string): string {
  if ('raw' in tree) return tree.raw;
  if ('items' in tree) return `[${tree.items.map((item) => textOf(item, gap)).join(`,${gap}`)}]`;
  return `{${tree.pairs.map(([key, value]) => `${JSON.stringify(key)}:${gap}${textOf(value, gap)}`).join(`,${gap}`)}}`;
}

/** Every value inside a tree that can be taken out or put in anew, itself included as the only item of a list. */
export interface Slot {
  holder: Exclude<Tree, { raw: string }>;
  at: number;
}

export function slotsOf(tree: Tree, found: Slot[] = []): Slot[] {
  if ('raw' in tree) return found;
  const children = 'items' in tree ? tree.items : tree.pairs.map(([, value]) => value);
  children.forEach((child, at) => {
    found.push({ holder: tree, at });
    slotsOf(child, found);
  });
  return found;
}

export function valueAt({ holder, at }: Slot): Tree {
  return 'items' in holder ? holder.items[at] : holder.pairs[at][1];
}

export function put({ holder, at }: Slot, value: Tree): void {
  if ('items' in holder) holder.items[at] = value;
  else holder.pairs[at][1] = value;
}

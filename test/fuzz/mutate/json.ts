import type { Dice } from '../dice';
import { brokenJson, hostileJson, hostileKeys } from '../hostile';
import { type Change, largestInput } from './bytes';
import { put, type Slot, slotsOf, type Tree, textOf, treeOf, valueAt } from './tree';

/** Words that mean something at some place of a document or a taps file, so that other rules are reached than "no such word". */
const words = [
  'cancel',
  'identify',
  'equalise',
  'predict',
  'covariance',
  'autocorrelation',
  'nearest',
  'error-aware',
  'saturate',
  'wrap',
  'float32',
  'float64',
  'c',
  'c-source',
  'rs',
  'csv',
  'npy',
  'newest-first',
  'none',
  'even',
  'odd',
  'samples',
  'seconds',
];
const pieces = [
  '\ufeff',
  '//',
  '/* */',
  ',',
  '\\',
  '"',
  '\u0000',
  '\r',
  '}',
  ']',
  '{',
  '[',
  ':',
  '\u00a0',
  '1e',
  '-',
];
const numbers = [
  0, 1, 2, 8, 12, 16, 24, 32, 33, 40, 64, 65, 128, 4096, 4097, 65536, 65537, 1e6, -1, 0.25, 1e-300,
];

function ofTree(
  change: (root: Tree & { items: Tree[] }, slots: Slot[], dice: Dice) => void,
): Change<Uint8Array> {
  return (bytes, dice) => {
    let value: unknown;
    try {
      value = JSON.parse(new TextDecoder().decode(bytes));
    } catch {
      return bytes;
    }
    const root = { items: [treeOf(value)] };
    change(root, slotsOf(root), dice);
    const text = root.items.map((item) => textOf(item, dice.one([' ', '\n', '', '\t']))).join(' ');
    return new TextEncoder().encode(text);
  };
}

const ofSlot = (change: (slot: Slot, dice: Dice, slots: Slot[]) => void) =>
  ofTree((_, slots, dice) => change(dice.one(slots), dice, slots));

/** A change of a value that is written like that, where there is any. */
const ofLeaf = (pattern: RegExp, change: (slot: Slot, dice: Dice) => void) =>
  ofTree((_, slots, dice) => {
    const leaves = slots.filter((slot) => {
      const value = valueAt(slot);
      return 'raw' in value && pattern.test(value.raw);
    });
    if (leaves.length > 0) change(dice.one(leaves), dice);
  });

/** A change of one entry of an object. */
const ofPair = (change: (pairs: [string, Tree][], at: number, dice: Dice, keys: string[]) => void) =>
  ofTree((_, slots, dice) => {
    const inObjects = slots.filter(({ holder }) => 'pairs' in holder);
    if (inObjects.length === 0) return;
    const { holder, at } = dice.one(inObjects);
    const keys = inObjects.flatMap((slot) => ('pairs' in slot.holder ? [slot.holder.pairs[slot.at][0]] : []));
    if ('pairs' in holder) change(holder.pairs, at, dice, keys);
  });

function drop({ holder, at }: Slot): void {
  if ('items' in holder) holder.items.splice(at, 1);
  else holder.pairs.splice(at, 1);
}

function nested(value: Tree, depth: number, dice: Dice): Tree {
  let tree = value;
  for (let k = 0; k < depth; k++) tree = dice.onceIn(2) ? { items: [tree] } : { pairs: [['takes', tree]] };
  return tree;
}

/** A long or odd text as JSON. */
function oddText(dice: Dice): string {
  const piece = dice.one([
    'x',
    'é',
    '\u{1F39B}',
    '\ud800',
    '\\',
    '"',
    '\u0000',
    '../',
    ' ',
    '\u2028',
    '{key}',
  ]);
  return JSON.stringify(piece.repeat(dice.onceIn(20) ? dice.size(100_000) : dice.size(300)));
}

/** Changes after which hardly any text is JSON; together as likely as one of the others. */
const breaks: readonly Change<Uint8Array>[] = [
  ofSlot((slot, dice) => put(slot, { raw: dice.one(brokenJson) })),
  ofTree((root) => {
    root.items.push(root.items[0]);
  }),
  (bytes, dice) => {
    const text = new TextDecoder().decode(bytes);
    const at = dice.below(text.length + 1);
    return new TextEncoder().encode(text.slice(0, at) + dice.one(pieces) + text.slice(at + dice.size(3)));
  },
];

export const jsonChanges: Record<string, Change<Uint8Array>> = {
  drop: ofSlot(drop),
  value: ofSlot((slot, dice) => put(slot, { raw: dice.one(hostileJson) })),
  word: ofLeaf(/^"/, (slot, dice) => put(slot, { raw: JSON.stringify(dice.one(words)) })),
  number: ofLeaf(/^[-\d]/, (slot, dice) => put(slot, { raw: String(dice.one(numbers)) })),
  text: ofSlot((slot, dice) => put(slot, { raw: oddText(dice) })),
  'value from elsewhere': ofSlot((slot, dice, slots) => put(slot, treeOfText(valueAt(dice.one(slots))))),
  nesting: ofSlot((slot, dice) => {
    const depth = dice.onceIn(4) ? dice.one([62, 63, 64, 65, 1000]) : 1 + dice.size(6);
    put(slot, nested(valueAt(slot), depth, dice));
  }),
  repeat: ofSlot(({ holder, at }, dice) => {
    const asked = dice.onceIn(60) ? dice.one([1000, 5000]) : 1 + dice.size(80);
    const count = Math.min(asked, Math.ceil(largestInput / textOf(valueAt({ holder, at }), '').length));
    if ('items' in holder) holder.items.splice(at, 0, ...new Array<Tree>(count).fill(holder.items[at]));
    else
      holder.pairs.splice(at, 0, ...new Array<[string, Tree]>(Math.min(count, 100)).fill(holder.pairs[at]));
  }),
  'other key': ofPair((pairs, at, dice, keys) => {
    pairs[at] = [dice.onceIn(2) ? dice.one(keys) : dice.one(hostileKeys), pairs[at][1]];
  }),
  'more keys': ofPair((pairs, at, dice) => {
    const most = dice.onceIn(10) ? 3000 : 20;
    const asked = dice.onceIn(400) ? 20_000 : 1 + dice.size(most);
    const count = Math.min(asked, Math.ceil(largestInput / textOf(pairs[at][1], '').length));
    const name = (k: number) => (k === 0 ? dice.one(hostileKeys) : `k${k}`);
    pairs.splice(at, 0, ...Array.from({ length: count }, (_, k): [string, Tree] => [name(k), pairs[at][1]]));
  }),
  'broken JSON': (bytes, dice) => dice.one(breaks)(bytes, dice),
};

/** A copy, so that no tree holds itself. */
function treeOfText(tree: Tree): Tree {
  if ('raw' in tree) return tree;
  return 'items' in tree
    ? { items: tree.items.map(treeOfText) }
    : { pairs: tree.pairs.map(([key, value]) => [key, treeOfText(value)]) };
}

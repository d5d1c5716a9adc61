import type { Dice } from '../dice';

/** One character a byte. */
export function latin1(bytes: Uint8Array): string {
  return Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength).toString('latin1');
}

const atoms = [
  'None',
  'True',
  'False',
  '0',
  '-5',
  '123456789012345678901234567890',
  "'a'",
  '"b"',
  "u'c'",
  "'\\''",
  "'open",
  '#',
  '',
];
const brackets = [
  ['{', '}'],
  ['(', ')'],
  ['[', ']'],
  ["{'descr': ", '}'],
] as const;

/** A Python literal, or something like it: nested, unclosed, with wrong brackets. */
export function literalOf(dice: Dice, depth = 0): string {
  if (dice.onceIn(30)) return dice.one(brackets)[0].repeat(dice.size(20_000));
  if (depth > 12 || dice.onceIn(3)) return dice.one(atoms);
  const [open, close] = dice.one(brackets);
  const items = Array.from({ length: dice.size(4) }, () =>
    open.startsWith('{') && !dice.onceIn(6)
      ? `'k${dice.below(5)}': ${literalOf(dice, depth + 1)}`
      : literalOf(dice, depth + 1),
  );
  return `${open}${items.join(dice.one([',', ', ', ' ', ',,']))}${dice.onceIn(10) ? dice.one([')', ']', '}', '']) : close}`;
}

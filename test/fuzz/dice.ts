import { seededUniform } from '../support/random';

/** Choices of one input; the same seed and number make the same choices. */
export interface Dice {
  /** A whole number in `[0, count)`. */
  below(count: number): number;
  one<T>(list: readonly T[]): T;
  /** True once in so many. */
  onceIn(count: number): boolean;
  /** A whole number in `[0, most]` that is small as often as it is large. */
  size(most: number): number;
}

/** The dice of input `number` of a run. */
export function newDice(seed: number, number: number): Dice {
  const uniform = seededUniform(Math.imul(seed + 1, 0x85ebca6b) ^ number);
  const below = (count: number) => Math.floor(uniform() * count);
  return {
    below,
    one: (list) => list[below(list.length)],
    onceIn: (count) => below(count) === 0,
    size: (most) => Math.floor((most + 1) ** uniform()) - (uniform() < 0.5 ? 1 : 0),
  };
}

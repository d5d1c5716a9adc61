import type { Symmetry } from '../document/pairingDocument';
import { elementsOf, type NormalSystem } from './normalSystem';

/**
 * The free taps of a filter whose taps mirror each other: `w[M-1-k] = ±w[k]`. Free tap a stands for w[a] and its mirror;
 * of an odd length the middle tap is free where the symmetry is even and 0 where it is odd.
 */
export interface Fold {
  /** M. */
  length: number;
  symmetry: Symmetry;
  /** Free taps of an input. */
  free: number;
  /** Taps that free tap a stands for, from 1 to 2. */
  members(a: number): { tap: number; sign: number }[];
}

/** @param length M, taps of an input */
export function newFold(length: number, symmetry: Symmetry): Fold {
  if (symmetry === 'none') {
    return { length, symmetry, free: length, members: (a) => [{ tap: a, sign: 1 }] };
  }
  const sign = symmetry === 'even' ? 1 : -1;
  return {
    length,
    symmetry,
    free: sign > 0 ? (length + 1) >> 1 : length >> 1,
    members: (a) => {
      const mirror = length - 1 - a;
      return mirror === a
        ? [{ tap: a, sign: 1 }]
        : [
            { tap: a, sign: 1 },
            { tap: mirror, sign },
          ];
    },
  };
}

/** All taps of each input from its free ones. */
export function unfold(fold: Fold, free: readonly Float64Array[]): Float64Array[] {
  return free.map((row) => {
    const taps = new Float64Array(fold.length);
    row.forEach((value, a) => {
      // Adding zero turns -0 into 0.
      for (const { tap, sign } of fold.members(a)) taps[tap] = sign * value + 0;
    });
    return taps;
  });
}

/**
 * The normal equations of the free taps, `Qᵀ A Q` with orthonormal columns of Q, so that the regularisation stays what it
 * is. The same system where there is no symmetry.
 * @param inputs K; the unknowns stand input by input
 */
export function foldSystem(system: NormalSystem, inputs: number, fold: Fold): NormalSystem {
  if (fold.symmetry === 'none') return system;
  const size = inputs * fold.free;
  const members = Array.from({ length: size }, (_, i) => {
    const r = Math.floor(i / fold.free);
    const taps = fold.members(i - r * fold.free);
    const weight = 1 / Math.sqrt(taps.length);
    return taps.map(({ tap, sign }) => ({ at: r * fold.length + tap, weight: sign * weight }));
  });
  const element = elementsOf(system, 0);
  const dense = new Float64Array(size * size);
  const right = new Float64Array(size);
  const scale = new Float64Array(size);
  for (let i = 0; i < size; i++) {
    for (const { at, weight } of members[i]) right[i] += weight * system.right[at];
    scale[i] = system.scale[members[i][0].at] * Math.sqrt(members[i].length);
    for (let j = 0; j <= i; j++) {
      let sum = 0;
      for (const a of members[i]) {
        for (const b of members[j]) {
          const value = a.at >= b.at ? element(a.at, b.at) : element(b.at, a.at);
          sum += a.weight * b.weight * value;
        }
      }
      dense[i * size + j] = sum;
    }
  }
  return { size, right, scale, matrix: { dense } };
}

import type { NormalSums } from './normalSums';

/**
 * Share of the raw normal matrix that is added to that of the band, 40 dB below it: outside the band the taps are held
 * towards no gain instead of being left to chance, and inside it the floor costs at most (1e-4)², -80 dB, of the output.
 */
export const floorShare = 1e-4;

/** Its root, by which samples are multiplied where products of two count. */
const floorRoot = 1e-2;

/**
 * What raw sums add to those of the band: a share of their normal matrix, edges included, and nothing of anything else.
 * They must run over the same n.
 */
export function bandFloor(raw: NormalSums): NormalSums {
  const none = () => new Float64Array(raw.length);
  const small = (rows: readonly Float64Array[]) => rows.map((row) => row.map((value) => floorRoot * value));
  return {
    inputs: raw.inputs,
    length: raw.length,
    count: 0,
    correlations: raw.correlations.map((row) =>
      row.map((column) => column.map((value) => floorShare * value)),
    ),
    cross: raw.cross.map(none),
    desiredEnergy: 0,
    edges: raw.edges.map(({ before, after }) => ({ before: small(before), after: small(after) })),
  };
}

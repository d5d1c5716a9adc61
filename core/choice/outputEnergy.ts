import type { NormalSums } from '../statistics/normalSums';
import { correlateEdge, type OutputTables, outputTables, transformTwo } from './outputTables';
import { toeplitzForms } from './toeplitzForms';

/** `wᵀ R w` for several filters of one length: the energy of their outputs over the summed n. */
export type OutputEnergy = (taps: readonly Float64Array[], length: number, into: Float64Array) => void;

/**
 * By transforms: the quadratic form is `Σ_f |W|² S` and the energies of the correlations with the samples at the edges
 * (see {@link OutputTables}), exact for every length. Two filters share their transforms.
 * Error about 1e-15 of `‖w‖²` times the largest sum.
 * @param sums of the inputs; taps stand tap by tap (k·K + r)
 */
export function outputEnergy(sums: NormalSums, tablesFor = outputTables(sums)): OutputEnergy {
  return (taps, length, into) => {
    const tables = tablesFor(length);
    for (let t = 0; t < taps.length; t += 2) {
      const [first, second] = pairEnergies(tables, taps[t], taps[t + 1] ?? null, length);
      into[t] = first;
      if (t + 1 < taps.length) into[t + 1] = second;
    }
  };
}

function pairEnergies(
  tables: OutputTables,
  first: Float64Array,
  second: Float64Array | null,
  length: number,
): [number, number] {
  transformTwo(tables, first, second, length);
  const { given, blocks, edges, scratch } = tables;
  const energies = toeplitzForms(given, blocks);
  for (const { sign, rows } of edges) {
    correlateEdge(tables, rows);
    for (let j = 1; j < length; j++) {
      energies[0] += sign * scratch.re[j] * scratch.re[j];
      energies[1] += sign * scratch.im[j] * scratch.im[j];
    }
  }
  return energies;
}

import type { JointSums, Layout } from './blockSums';
import { newWalker } from './delayWalk';
import { eliminateRow, eliminateTwoRows, takesTwo } from './eliminateRow';
import { newGenerators } from './generators';
import { crossSums } from './jointParts';
import type { NestedFitter } from './nestedFits';

/**
 * Fits of all lengths and delays by the generalised Schur algorithm on `[R Θᵀ I; Θ 0 0; I 0 0]` (Kailath & Sayed, *SIAM
 * Review* 37, 1995, from memory). The rows of I that a step leaves in its pivot are a row of L⁻¹, R = LLᵀ: they give the
 * taps for the smallest delay. After as many steps as a length has unknowns, what is left in the rows of I and of Θ leads
 * from the taps of each delay to those of the next, so that no factor is kept and nothing is substituted back.
 *
 * About 2 n² multiply-adds for each partner of the pivots: one for each input and two for each stretch of training
 * samples. Relative error of the taps about 10 to 100 times 1e-16 times the condition number.
 */
export function structuredFitter(sums: JointSums, layout: Layout): NestedFitter {
  const { inputs, length, delays } = layout;
  const size = inputs * length;
  const generatorsAt = newGenerators(sums, layout);
  const [entry] = crossSums(sums, { ...layout, delays: [delays[0]] });
  for (let k = 0; k < size; k++) entry[k] /= sums.count;
  const walk = newWalker(layout, entry, sums.edges.length);
  const tolerance = size * 2.220446049250313e-16;
  return function* (regularisation, lengths) {
    const generators = generatorsAt(regularisation);
    if (generators === null) return;
    const fit = { p: entry, w: new Float64Array(size), row: new Float64Array(size) };
    const twice = takesTwo(generators);
    let place = 0;
    for (let step = 0; place < lengths.length; ) {
      const two = twice && step > 0 && step + 2 <= lengths[place];
      const eliminate = two ? eliminateTwoRows : eliminateRow;
      if (!eliminate(generators, step, tolerance, fit)) return;
      step += two ? 2 : 1;
      if (step < lengths[place] * inputs) continue;
      yield { place, length: lengths[place], ...walk(generators, lengths[place], fit.w) };
      place++;
    }
  };
}

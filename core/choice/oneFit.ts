import { inner } from '../solvers/vectors';
import type { JointSums, Layout } from './blockSums';
import type { Centre } from './grid';
import { crossSums, desiredEnergies, inputSums } from './jointParts';
import { nestedFitter } from './nestedFits';
import { outputEnergy } from './outputEnergy';

/** Error and desired energy over some n; 1 is the power of the desired signal. */
export interface Energies {
  error: number;
  desired: number;
}

/**
 * The error of one filter, fitted on the training sums, over each of other sums, without filtering:
 * `Σ d² - 2 wᵀθ + wᵀΦw`. Error about 1e-13 of Σ d².
 * @param layout that the sums were gathered with; the filter must lie in it
 * @returns null where the fit cannot be solved
 */
export function errorsOfOne(
  training: JointSums,
  measured: readonly JointSums[],
  layout: Layout,
  { length, delay, regularisation }: Centre,
): Energies[] | null {
  const [first] = layout.delays;
  const delays = delay === first ? [first] : [first, delay];
  const own: Layout = { ...layout, delays };
  const last = delays.length - 1;
  for (const { taps } of nestedFitter(training, own)(regularisation, [length])) {
    return measured.map((sums) => {
      const row = taps[last];
      const cross = crossSums(sums, own)[last];
      const desired = desiredEnergies(sums, own)[last];
      const output = new Float64Array(1);
      outputEnergy(inputSums(sums, own))([row], length, output);
      const unknowns = length * layout.inputs;
      const product = inner(row.subarray(0, unknowns), cross);
      return { error: Math.max(0, desired - 2 * product + output[0]), desired };
    });
  }
  return null;
}

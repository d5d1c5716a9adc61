import type { NormalSums } from '../statistics/normalSums';
import type { JointSums, Layout } from './blockSums';

/** The sums of the inputs alone, for the longest candidate. Views where nothing changes. */
export function inputSums(sums: JointSums, { inputs, length }: Layout): NormalSums {
  const own = (rows: readonly Float64Array[], count: number) =>
    rows.slice(0, inputs).map((row) => row.subarray(0, count));
  return {
    inputs,
    length,
    count: sums.count,
    correlations: sums.correlations.slice(0, inputs).map((rows) => own(rows, length)),
    cross: own(sums.cross, length),
    desiredEnergy: sums.desiredEnergy,
    edges: sums.edges.map(({ before, after }) => ({
      before: own(before, length - 1),
      after: own(after, length - 1),
    })),
  };
}

/**
 * θ of each candidate delay over the summed n, tap by tap (place k·K + r: `Σ x_r[n-k] d[n-Δ]`). From one delay to the
 * next every element moves on by a tap, mended by the samples at the edges:
 * `θ_{Δ+1}[k+1] = θ_Δ[k] + x[a-1-k] d[a-1-Δ] - x[b-1-k] d[b-1-Δ]`; the first tap is summed by itself.
 * Error about 1e-16 of the largest sum for each delay that is passed.
 */
export function crossSums(sums: JointSums, { inputs, length, delays }: Layout): Float64Array[] {
  const row = new Float64Array(inputs * length);
  const result: Float64Array[] = [];
  for (let r = 0; r < inputs; r++) {
    for (let k = 0; k < length; k++) row[k * inputs + r] = sums.correlations[r][inputs][k];
  }
  for (let delay = delays[0]; ; delay++) {
    if (delay === delays[result.length]) result.push(row.slice());
    if (result.length === delays.length) return result;
    const s = delay - delays[0];
    row.copyWithin(inputs, 0);
    for (let r = 0; r < inputs; r++) {
      row[r] = sums.correlations[inputs][r][s + 1];
      for (const { before, after } of sums.edges) {
        const first = before[inputs][s];
        const last = after[inputs][s];
        const [early, late] = [before[r], after[r]];
        for (let k = 1; k < length; k++) row[k * inputs + r] += first * early[k - 1] - last * late[k - 1];
      }
    }
  }
}

/** Σ d[n-Δ]² of each candidate delay over the summed n. */
export function desiredEnergies(sums: JointSums, { inputs, delays }: Layout): Float64Array {
  const energies = new Float64Array(delays.length);
  let energy = sums.correlations[inputs][inputs][0];
  let place = 0;
  for (let delay = delays[0]; place < delays.length; delay++) {
    if (delay === delays[place]) energies[place++] = energy;
    const s = delay - delays[0];
    for (const { before, after } of sums.edges) {
      const first = before[inputs][s] ?? 0;
      const last = after[inputs][s] ?? 0;
      energy += first * first - last * last;
    }
  }
  return energies;
}

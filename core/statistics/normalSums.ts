/**
 * The sums that the normal equations are made of, as a value: sums over stretches of data add.
 * With x_r and d as the fit uses them (means taken off, d delayed by Δ), over all n of all stretches:
 */
export interface NormalSums {
  /** K, number of inputs. */
  inputs: number;
  /** M, taps per input. */
  length: number;
  /** L, what the sums are divided by. */
  count: number;
  /** `correlations[r][s][k] = Σ x_r[n-k] x_s[n]`, 0 ≤ k < M. */
  correlations: Float64Array[][];
  /** `cross[r][k] = Σ x_r[n-k] d[n-Δ]`, 0 ≤ k < M. */
  cross: Float64Array[];
  /** `Σ d[n-Δ]²`. */
  desiredEnergy: number;
  /**
   * One for each stretch [a, b) whose neighbours are not zero: the samples that the shift updates
   * `Φ[k+1,l+1] = Φ[k,l] + x[a-1-k] x[a-1-l] - x[b-1-k] x[b-1-l]` need. None with `autocorrelation` windowing.
   */
  edges: Edge[];
}

export interface Edge {
  /** `before[r][k] = x_r[a-1-k]`, 0 ≤ k < M-1. */
  before: Float64Array[];
  /** `after[r][k] = x_r[b-1-k]`, 0 ≤ k < M-1. */
  after: Float64Array[];
}

export function emptySums(inputs: number, length: number): NormalSums {
  const row = () => new Float64Array(length);
  return {
    inputs,
    length,
    count: 0,
    correlations: Array.from({ length: inputs }, () => Array.from({ length: inputs }, row)),
    cross: Array.from({ length: inputs }, row),
    desiredEnergy: 0,
    edges: [],
  };
}

/** Adds `more` to `sums` in place. Both must be of the same inputs and length. */
export function addSums(sums: NormalSums, more: NormalSums): void {
  sums.count += more.count;
  sums.desiredEnergy += more.desiredEnergy;
  sums.edges.push(...more.edges);
  for (let r = 0; r < sums.inputs; r++) {
    addRow(sums.cross[r], more.cross[r]);
    for (let s = 0; s < sums.inputs; s++) addRow(sums.correlations[r][s], more.correlations[r][s]);
  }
}

function addRow(row: Float64Array, more: Float64Array): void {
  for (let k = 0; k < row.length; k++) row[k] += more[k];
}

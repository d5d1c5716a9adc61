import { newSpectrum, type Spectrum } from '../statistics/blockSpectra';
import type { NormalSums } from '../statistics/normalSums';
import { sizeFor, type Transform, transformOf } from '../statistics/transform';
import { toeplitzForms } from './toeplitzForms';

/** `wᵀ R w` for several filters of one length: the energy of their outputs over the summed n. */
export type OutputEnergy = (taps: readonly Float64Array[], length: number, into: Float64Array) => void;

/**
 * By transforms. The matrix of a covariance sum is a Toeplitz one and what its shift updates add,
 * `R = T + Σ_{j≥1} F^j (b bᵀ - a aᵀ) F^jᵀ`, b and a the samples at the edges: so the quadratic form is
 * `Σ_f |W|² S` and the energies of two correlations, exact for every length. Two filters share their transforms.
 * Error about 1e-15 of `‖w‖²` times the largest sum.
 * @param sums of the inputs; taps stand tap by tap (k·K + r)
 */
export function outputEnergy(sums: NormalSums): OutputEnergy {
  const tables = new Map<number, Tables>();
  return (taps, length, into) => {
    const size = sizeFor(2 * length);
    const table = tables.get(size) ?? newTables(sums, size);
    tables.set(size, table);
    for (let t = 0; t < taps.length; t += 2) {
      const [first, second] = pairEnergies(table, taps[t], taps[t + 1] ?? null, length);
      into[t] = first;
      if (t + 1 < taps.length) into[t + 1] = second;
    }
  };
}

/** What depends on the sums and on the size of the transform. */
interface Tables {
  inputs: number;
  transform: Transform;
  /** `[r][s]`: spectrum of the circulant matrix that Toeplitz block (r, s) is the corner of. */
  blocks: Spectrum[][];
  /** Spectra of the samples at each edge and the sign with which they count. */
  edges: { sign: number; rows: Spectrum[] }[];
  given: Spectrum[];
  scratch: Spectrum;
}

function newTables({ inputs, length, correlations, edges }: NormalSums, size: number): Tables {
  const transform = transformOf(size);
  // Lags from half the size on belong to no filter of this size.
  const lags = Math.min(length, size / 2);
  const spectrumOf = (fill: (re: Float64Array) => void) => {
    const spectrum = newSpectrum(size);
    fill(spectrum.re);
    transform.forward(spectrum.re, spectrum.im);
    return spectrum;
  };
  const side = (rows: readonly Float64Array[], sign: number) => ({
    sign,
    rows: rows.map((row) => spectrumOf((re) => re.set(row.subarray(0, lags - 1)))),
  });
  return {
    inputs,
    transform,
    blocks: correlations.map((row, r) =>
      row.map((column, s) =>
        spectrumOf((re) => {
          for (let k = 0; k < lags; k++) re[k] = column[k];
          for (let k = 1; k < lags; k++) re[size - k] = correlations[s][r][k];
        }),
      ),
    ),
    edges: edges.flatMap(({ before, after }) => [side(before, 1), side(after, -1)]),
    given: Array.from({ length: inputs }, () => newSpectrum(size)),
    scratch: newSpectrum(size),
  };
}

function pairEnergies(
  table: Tables,
  first: Float64Array,
  second: Float64Array | null,
  length: number,
): [number, number] {
  const { inputs, transform, given, edges, scratch } = table;
  for (let r = 0; r < inputs; r++) {
    const { re, im } = given[r];
    re.fill(0);
    im.fill(0);
    for (let k = 0; k < length; k++) re[k] = first[k * inputs + r];
    if (second !== null) for (let k = 0; k < length; k++) im[k] = second[k * inputs + r];
    transform.forward(re, im);
  }
  const energies = toeplitzForms(given, table.blocks);
  for (const { sign, rows } of edges) {
    scratch.re.fill(0);
    scratch.im.fill(0);
    for (let r = 0; r < inputs; r++) addCorrelation(scratch, given[r], rows[r]);
    transform.inverse(scratch.re, scratch.im);
    for (let j = 1; j < length; j++) {
      energies[0] += sign * scratch.re[j] * scratch.re[j];
      energies[1] += sign * scratch.im[j] * scratch.im[j];
    }
  }
  return energies;
}

/** Adds `z conj(b)`. */
function addCorrelation({ re, im }: Spectrum, z: Spectrum, b: Spectrum): void {
  for (let p = 0; p < re.length; p++) {
    re[p] += z.re[p] * b.re[p] + z.im[p] * b.im[p];
    im[p] += z.im[p] * b.re[p] - z.re[p] * b.im[p];
  }
}

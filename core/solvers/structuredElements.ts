import type { ShiftStructure } from './displacement';

/**
 * Elements (i, j) of `A + ρ I` from its shift structure, for a matrix that is too large to be formed; unknowns input by
 * input. Each takes as many steps as the smaller of the two taps.
 */
export function structuredElements(
  { length, columns, edges }: ShiftStructure,
  regularisation: number,
): (i: number, j: number) => number {
  return (i, j) => {
    const r = Math.floor(i / length);
    const s = Math.floor(j / length);
    const k = i - r * length;
    const l = j - s * length;
    let value = k >= l ? columns[r][s][k - l] : columns[s][r][l - k];
    if (i === j) value += regularisation;
    for (const { before, after } of edges) {
      for (let m = Math.min(k, l); m > 0; m--) {
        const a = k - m;
        const b = l - m;
        value += before[r][a] * before[s][b] - after[r][a] * after[s][b];
      }
    }
    return value;
  };
}

/** The diagonal of `A + ρ I`, tap by tap from the one before. */
export function structuredDiagonal(
  { inputs, length, columns, edges }: ShiftStructure,
  regularisation: number,
): Float64Array {
  const diagonal = new Float64Array(inputs * length);
  for (let r = 0; r < inputs; r++) {
    let value = columns[r][r][0] + regularisation;
    for (let k = 0; k < length; k++) {
      if (k > 0) {
        for (const { before, after } of edges) {
          value += before[r][k - 1] * before[r][k - 1] - after[r][k - 1] * after[r][k - 1];
        }
      }
      diagonal[r * length + k] = value;
    }
  }
  return diagonal;
}

/**
 * Elements near to those of A off the diagonal, each looked up in a step: as if every row were the first one moved on.
 * Their error is about the filter's length over the samples of the fit.
 */
export function nearElements({ length, columns }: ShiftStructure): (i: number, j: number) => number {
  return (i, j) => {
    const r = Math.floor(i / length);
    const s = Math.floor(j / length);
    const lag = i - r * length - (j - s * length);
    return lag >= 0 ? columns[r][s][lag] : columns[s][r][-lag];
  };
}

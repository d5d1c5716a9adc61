/** A small complex Hermitian system, to be used again and again for systems of one size. */
export interface HermitianSolver {
  /** A, row-major size × size, lower triangle and diagonal; overwritten. */
  re: Float64Array;
  im: Float64Array;
  /** b; overwritten by the solution h of A h = b. */
  rightRe: Float64Array;
  rightIm: Float64Array;
  /**
   * Solves what the arrays hold.
   * @returns `explained`: b^H A⁻¹ b, never negative; `rank`: unknowns that were not left out
   */
  solve(): { explained: number; rank: number };
}

/**
 * Share of an unknown's own diagonal element that must be left when those before it have been taken out. Averaged
 * spectra of signals that depend on each other come to about 1e-16; below 1e-10 what is left is rounding of the
 * transforms, not a signal of its own.
 */
const guard = 1e-10;

/**
 * Cholesky's method `A = G Gᴴ` (Golub & Van Loan, *Matrix Computations*, ch. 4, from memory) for a few unknowns.
 * An unknown that depends on those before it is left out: its solution is 0. Units do not matter.
 */
export function newHermitianSolver(size: number): HermitianSolver {
  const re = new Float64Array(size * size);
  const im = new Float64Array(size * size);
  const rightRe = new Float64Array(size);
  const rightIm = new Float64Array(size);

  /** Row i of G, then y_i of G y = b. */
  function eliminate(i: number): boolean {
    const row = i * size;
    const diagonal = re[row + i];
    let pivot = diagonal;
    for (let j = 0; j < i; j++) {
      const other = j * size;
      const divisor = re[other + j];
      let a = re[row + j];
      let b = im[row + j];
      for (let k = 0; k < j; k++) {
        a -= re[row + k] * re[other + k] + im[row + k] * im[other + k];
        b -= im[row + k] * re[other + k] - re[row + k] * im[other + k];
      }
      re[row + j] = divisor > 0 ? a / divisor : 0;
      im[row + j] = divisor > 0 ? b / divisor : 0;
      pivot -= re[row + j] * re[row + j] + im[row + j] * im[row + j];
      rightRe[i] -= re[row + j] * rightRe[j] - im[row + j] * rightIm[j];
      rightIm[i] -= re[row + j] * rightIm[j] + im[row + j] * rightRe[j];
    }
    const kept = pivot > guard * diagonal;
    const root = kept ? Math.sqrt(pivot) : 0;
    re[row + i] = root;
    rightRe[i] = kept ? rightRe[i] / root : 0;
    rightIm[i] = kept ? rightIm[i] / root : 0;
    return kept;
  }

  /** Gᴴ h = y. */
  function substitute(): void {
    for (let i = size - 1; i >= 0; i--) {
      const divisor = re[i * size + i];
      let a = rightRe[i];
      let b = rightIm[i];
      for (let k = i + 1; k < size; k++) {
        const g = k * size + i;
        a -= re[g] * rightRe[k] + im[g] * rightIm[k];
        b -= re[g] * rightIm[k] - im[g] * rightRe[k];
      }
      rightRe[i] = divisor > 0 ? a / divisor : 0;
      rightIm[i] = divisor > 0 ? b / divisor : 0;
    }
  }

  return {
    re,
    im,
    rightRe,
    rightIm,
    solve() {
      let rank = 0;
      let explained = 0;
      for (let i = 0; i < size; i++) {
        if (eliminate(i)) rank++;
        explained += rightRe[i] * rightRe[i] + rightIm[i] * rightIm[i];
      }
      substitute();
      return { explained, rank };
    },
  };
}

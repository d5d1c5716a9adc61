import { type Operator, startVector } from './conditionNumber';
import { addMultiple, inner, norm } from './vectors';

/** Steps after which the value is taken as it is. */
const mostSteps = 80;

/** A direction of which no more than this is new adds nothing but rounding. */
const leastNew = 1e-7;

interface Direction {
  vector: Float64Array;
  /** Its product with the matrix. */
  product: Float64Array;
}

/**
 * Smallest eigenvalue of a symmetric positive definite operator, from above, where no inverse is at hand: the locally
 * optimal preconditioned gradient method (Knyazev, *SIAM J. Sci. Comput.* 23, 2001, from memory) with one vector. Each step
 * takes one product and one use of the preconditioner and seeks the least Rayleigh quotient over the vector, its
 * preconditioned residual and the step before.
 * @param precondition symmetric positive definite, close to the inverse
 * @param settled ends the steps where four of them lowered the value by no more than this share of it
 */
export function smallestEigenvalue(
  multiply: Operator,
  precondition: Operator,
  size: number,
  settled: number,
): number {
  // Inverse iteration by the preconditioner: what it makes large lies near the smallest eigenvalues.
  const vector = precondition(precondition(startVector(size)).slice()).slice();
  const length = norm(vector);
  for (let k = 0; k < size; k++) vector[k] /= length;
  let now: Direction = { vector, product: multiply(vector).slice() };
  let before: Direction | null = null;
  let value = inner(now.vector, now.product);
  let lastValue = value;
  for (let step = 1; step <= mostSteps; step++) {
    const residual = now.product.slice();
    addMultiple(residual, now.vector, -value);
    const basis = [now];
    for (const next of [fresh(precondition(residual).slice(), multiply), before]) {
      if (next !== null && madeOrthonormal(next, basis)) basis.push(next);
    }
    if (basis.length === 1) break;
    const shares = leastOf(basis.map((a) => basis.map((b) => inner(a.vector, b.product))));
    before = combined(basis.slice(1), shares.slice(1));
    now = combined(basis, shares);
    value = inner(now.vector, now.product) / inner(now.vector, now.vector);
    if (step % 4 === 0) {
      if (lastValue - value <= settled * value) break;
      lastValue = value;
    }
  }
  return value;
}

function fresh(vector: Float64Array, multiply: Operator): Direction {
  return { vector, product: multiply(vector).slice() };
}

/** Takes the share of the others out of a direction and brings it to length 1; false where too little is left. */
function madeOrthonormal(next: Direction, basis: readonly Direction[]): boolean {
  const whole = norm(next.vector);
  for (let pass = 0; pass < 2; pass++) {
    for (const { vector, product } of basis) {
      const share = -inner(vector, next.vector);
      addMultiple(next.vector, vector, share);
      addMultiple(next.product, product, share);
    }
  }
  const left = norm(next.vector);
  if (!(left > leastNew * whole)) return false;
  for (let k = 0; k < next.vector.length; k++) {
    next.vector[k] /= left;
    next.product[k] /= left;
  }
  return true;
}

function combined(basis: readonly Direction[], shares: readonly number[]): Direction {
  const size = basis[0].vector.length;
  const sum = { vector: new Float64Array(size), product: new Float64Array(size) };
  basis.forEach(({ vector, product }, j) => {
    addMultiple(sum.vector, vector, shares[j]);
    addMultiple(sum.product, product, shares[j]);
  });
  return sum;
}

/** Unit vector of the least quotient of a symmetric matrix of two or three rows, by Jacobi's rotations. */
function leastOf(rows: number[][]): number[] {
  const n = rows.length;
  const vectors = rows.map((_, i) => rows.map((_row, j) => Number(i === j)));
  for (let sweep = 0; sweep < 12; sweep++) {
    for (let i = 0; i < n; i++) {
      for (let j = i + 1; j < n; j++) turn(rows, vectors, i, j);
    }
  }
  let least = 0;
  for (let i = 1; i < n; i++) if (rows[i][i] < rows[least][least]) least = i;
  return vectors.map((row) => row[least]);
}

/** Makes elements (i, j) and (j, i) zero. */
function turn(rows: number[][], vectors: number[][], i: number, j: number): void {
  const beside = 0.5 * (rows[i][j] + rows[j][i]);
  if (beside === 0) return;
  const ratio = (rows[j][j] - rows[i][i]) / (2 * beside);
  const tangent = (ratio < 0 ? -1 : 1) / (Math.abs(ratio) + Math.sqrt(ratio * ratio + 1));
  const cosine = 1 / Math.sqrt(tangent * tangent + 1);
  const sine = tangent * cosine;
  const mix = (row: number[]) => {
    const a = row[i];
    row[i] = cosine * a - sine * row[j];
    row[j] = sine * a + cosine * row[j];
  };
  for (const row of rows) mix(row);
  for (const row of vectors) mix(row);
  const a = rows[i].slice();
  for (let k = 0; k < rows.length; k++) {
    rows[i][k] = cosine * a[k] - sine * rows[j][k];
    rows[j][k] = sine * a[k] + cosine * rows[j][k];
  }
}

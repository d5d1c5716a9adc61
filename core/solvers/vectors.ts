/** Σ a[k] b[k], from the first on. */
export function inner(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let k = 0; k < a.length; k++) sum += a[k] * b[k];
  return sum;
}

/** 2-norm. */
export function norm(v: Float64Array): number {
  return Math.sqrt(inner(v, v));
}

/** `vector += factor · other`, in place. */
export function addMultiple(vector: Float64Array, other: Float64Array, factor: number): void {
  for (let k = 0; k < vector.length; k++) vector[k] += factor * other[k];
}

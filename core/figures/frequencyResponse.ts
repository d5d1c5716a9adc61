/** Complex values over frequency. */
export interface FrequencyResponse {
  real: Float64Array;
  imaginary: Float64Array;
}

/**
 * `H(f) = Σ_k w[k] e^(-2πifk)` at `points` frequencies from 0 to half the sample rate, both included: `f_i = i / (2 (points - 1))`
 * cycles a sample. For showing only: cosine and sine differ between engines in the last digit.
 * @param coefficients newest-first
 * @param points at least 2
 */
export function frequencyResponse(coefficients: ArrayLike<number>, points: number): FrequencyResponse {
  const real = new Float64Array(points);
  const imaginary = new Float64Array(points);
  for (let i = 0; i < points; i++) {
    const angle = (-Math.PI * i) / (points - 1);
    const c = Math.cos(angle);
    const s = Math.sin(angle);
    // Horner's rule in z^-1 = c + i s.
    let re = 0;
    let im = 0;
    for (let k = coefficients.length - 1; k >= 0; k--) {
      const turned = re * c - im * s + coefficients[k];
      im = re * s + im * c;
      re = turned;
    }
    real[i] = re;
    imaginary[i] = im;
  }
  return { real, imaginary };
}

/** `20 log10 |H|` for every frequency; minus infinity where it is zero. */
export function magnitudeDecibels({ real, imaginary }: FrequencyResponse): Float64Array {
  return real.map((re, i) => 10 * Math.log10(re * re + imaginary[i] * imaginary[i]));
}

import { inspectSpectra, type SpectraRequest } from '../../../../core/suitability/pair/inspectSpectra';
import { normals, seededUniform } from '../../../support/random';
import { pace } from '../../../support/takes';

/** Adds what a resonance makes of a signal: two poles at `frequency` (cycles a sample), ringing for q/π cycles. */
export function addResonance(
  into: Float64Array,
  x: Float64Array,
  { frequency, q, gain, lag = 0 }: { frequency: number; q: number; gain: number; lag?: number },
): void {
  const radius = Math.exp((-Math.PI * frequency) / q);
  const a1 = 2 * radius * Math.cos(2 * Math.PI * frequency);
  const a2 = -radius * radius;
  let one = 0;
  let two = 0;
  for (let n = 0; n < x.length; n++) {
    const value = gain * (1 - radius) * (n >= lag ? x[n - lag] : 0) + a1 * one + a2 * two;
    two = one;
    one = value;
    into[n] += value;
  }
}

/** White noise through one pole. */
export function coloured(seed: number, samples: number, pole: number): Float64Array {
  const x = normals(seed, samples);
  for (let n = 1; n < samples; n++) x[n] += pole * x[n - 1];
  return x;
}

export interface SeededPath {
  inputs: Float64Array[];
  desired: Float64Array;
  lag: number;
  /** Reduction in dB that the best filter reaches: all that is left is the noise. */
  limitDb: number;
  noisePower: number;
}

/** One to three resonances after a lag of up to 200 samples, coloured input, white noise 5 to 40 dB below. */
export function seededPath(seed: number, samples: number, sharpest: number): SeededPath {
  const uniform = seededUniform(seed);
  const lag = Math.floor(200 * uniform());
  const x = coloured(10 * seed, samples, 1.8 * uniform() - 0.9);
  const clean = new Float64Array(samples);
  const modes = 1 + Math.floor(3 * uniform());
  for (let mode = 0; mode < modes; mode++) {
    const frequency = 0.02 + 0.4 * uniform();
    addResonance(clean, x, { frequency, q: 2 + sharpest * uniform(), gain: 0.5 + uniform(), lag });
  }
  const power = meanSquare(clean);
  const noisePower = power / 10 ** (0.5 + 3.5 * uniform());
  const noise = normals(10 * seed + 1, samples).map((value) => Math.sqrt(noisePower) * value);
  const desired = clean.map((value, n) => value + noise[n]);
  const limitDb = 10 * Math.log10(meanSquare(desired) / meanSquare(noise));
  return { inputs: [x], desired, lag, limitDb, noisePower };
}

export function meanSquare(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value * value, 0) / values.length;
}

/** The inspection with what most tests leave as it is: 1000 samples a second, no means, lags 0. */
export function inspect(request: Pick<SpectraRequest, 'takes' | 'job'> & Partial<SpectraRequest>) {
  const { takes } = request;
  return inspectSpectra(
    {
      filter: { length: 64, delay: 0, regularisation: 1e-6 },
      sampleRate: 1000,
      means: { inputs: takes[0].inputs.map(() => 0), desired: 0 },
      lags: takes.map(() => 0),
      ...request,
    },
    pace,
  );
}

/** Codes of the findings. */
export function codes({ findings }: { findings: readonly { code: string }[] }): string[] {
  return findings.map(({ code }) => code);
}

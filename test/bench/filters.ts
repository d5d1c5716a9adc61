/** A linear, time-invariant step from one signal to another of the same length, started from rest. */
export type Filter = (input: Float64Array) => Float64Array;

/** Coefficients of (b0 + b1/z + b2/z²) / (1 + a1/z + a2/z²). */
export interface SecondOrder {
  b0: number;
  b1: number;
  b2: number;
  a1: number;
  a2: number;
}

/**
 * tan x by Lambert's continued fraction, nine levels: for 0 ≤ x ≤ 1.4 the relative error is below 1e-12. Only + - * /
 * in a fixed order, so that every engine gives the same bits, which `Math.tan` does not promise.
 */
export function tangent(x: number): number {
  let tail = 17;
  for (let odd = 15; odd >= 1; odd -= 2) tail = odd - (x * x) / tail;
  return x / tail;
}

/** Runs a second-order section in direct form II transposed. */
export function secondOrder({ b0, b1, b2, a1, a2 }: SecondOrder): Filter {
  return (input) => {
    const output = new Float64Array(input.length);
    let first = 0;
    let second = 0;
    for (let n = 0; n < input.length; n++) {
      const y = b0 * input[n] + first;
      first = b1 * input[n] - a1 * y + second;
      second = b2 * input[n] - a2 * y;
      output[n] = y;
    }
    return output;
  };
}

/**
 * A mass on a spring and a damper, gain 1 at rest: resonance at `hertz`, quality factor `q`, by the bilinear transform
 * (Oppenheim & Schafer, Discrete-Time Signal Processing, ch. 7) with that frequency kept in place.
 */
export function lowPass(hertz: number, q: number, sampleRate: number): Filter {
  const k = tangent((Math.PI * hertz) / sampleRate);
  const scale = 1 / (1 + k / q + k * k);
  const b = k * k * scale;
  return secondOrder({
    b0: b,
    b1: 2 * b,
    b2: b,
    a1: 2 * (k * k - 1) * scale,
    a2: (1 - k / q + k * k) * scale,
  });
}

/** A mode of vibration, gain 1 at its resonance at `hertz`, quality factor `q`, by the same transform. */
export function bandPass(hertz: number, q: number, sampleRate: number): Filter {
  const k = tangent((Math.PI * hertz) / sampleRate);
  const scale = 1 / (1 + k / q + k * k);
  const b = (k / q) * scale;
  return secondOrder({ b0: b, b1: 0, b2: -b, a1: 2 * (k * k - 1) * scale, a2: (1 - k / q + k * k) * scale });
}

/** y[n] = pole y[n-1] + (1 - pole) x[n]: a first-order lag of gain 1. */
export function lag(pole: number): Filter {
  return secondOrder({ b0: 1 - pole, b1: 0, b2: 0, a1: -pole, a2: 0 });
}

/** Shifts a signal to later by whole samples. */
export function delayed(samples: number): Filter {
  return (input) => {
    const output = new Float64Array(input.length);
    output.set(input.subarray(0, Math.max(0, input.length - samples)), samples);
    return output;
  };
}

export function scaled(gain: number): Filter {
  return (input) => input.map((value) => gain * value);
}

/** One filter after the other. */
export function chain(...filters: Filter[]): Filter {
  return (input) => filters.reduce((signal, filter) => filter(signal), input);
}

/** Sample by sample. */
export function sum(...signals: Float64Array[]): Float64Array {
  return signals[0].map((_, n) => signals.reduce((total, signal) => total + signal[n], 0));
}

/** A one followed by zeros. */
export function impulse(length: number): Float64Array {
  const signal = new Float64Array(length);
  signal[0] = 1;
  return signal;
}

import { tangent } from './filters';

/** A complex number; as a rotation, cos + i sin of the angle a sinusoid turns through in a sample. */
export interface Complex {
  re: number;
  im: number;
}

export function times(a: Complex, b: Complex): Complex {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

export function plus(a: Complex, b: Complex): Complex {
  return { re: a.re + b.re, im: a.im + b.im };
}

export function conjugate(a: Complex): Complex {
  return { re: a.re, im: -a.im };
}

/** The turn per sample of a sinusoid, from the tangent of half its angle: a rational point of the unit circle. */
export function rotation(hertz: number, sampleRate: number): Complex {
  const t = tangent((Math.PI * hertz) / sampleRate);
  return { re: (1 - t * t) / (1 + t * t), im: (2 * t) / (1 + t * t) };
}

/** `turn` to a whole power. */
export function power(turn: Complex, exponent: number): Complex {
  if (exponent < 0) return conjugate(power(turn, -exponent));
  let result = { re: 1, im: 0 };
  for (let k = 0; k < exponent; k++) result = times(result, turn);
  return result;
}

/** A sinusoid by a recursive oscillator: the real part of gain · turnⁿ. */
export function sinusoid(turn: Complex, gain: Complex, length: number): Float64Array {
  const signal = new Float64Array(length);
  let state = gain;
  for (let n = 0; n < length; n++) {
    signal[n] = state.re;
    state = times(state, turn);
  }
  return signal;
}

/** The frequency response Σ h[k] turn⁻ᵏ of an impulse response. */
export function responseAt(turn: Complex, response: Float64Array): Complex {
  const back = conjugate(turn);
  let result = { re: 0, im: 0 };
  for (let k = response.length - 1; k >= 0; k--) {
    result = plus(times(result, back), { re: response[k], im: 0 });
  }
  return result;
}

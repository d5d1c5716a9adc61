import { describe, expect, it } from 'vitest';
import { bandPass, impulse, lowPass, tangent } from './filters';
import { responseAt, rotation, sinusoid } from './phasor';

const magnitude = ({ re, im }: { re: number; im: number }) => Math.hypot(re, im);

describe('tangent', () => {
  it('agrees with Math.tan to 1e-12', () => {
    for (let x = 0.01; x < 1.4; x += 0.01) expect(Math.abs(tangent(x) / Math.tan(x) - 1)).toBeLessThan(1e-12);
  });
});

describe('sinusoid', () => {
  it('agrees with Math.cos over 20,000 samples', () => {
    const signal = sinusoid(rotation(27.7, 800), { re: 1, im: 0 }, 20_000);
    for (let n = 0; n < signal.length; n += 97) {
      expect(signal[n]).toBeCloseTo(Math.cos((2 * Math.PI * 27.7 * n) / 800), 8);
    }
  });
});

describe('second-order sections', () => {
  it('have the gains of their analogue models: 1 at rest and q at resonance, or 1 at resonance', () => {
    const at = (hertz: number) => rotation(hertz, 800);
    const spring = lowPass(88, 3, 800)(impulse(2048));
    expect(magnitude(responseAt(at(0), spring))).toBeCloseTo(1, 9);
    expect(magnitude(responseAt(at(88), spring))).toBeCloseTo(3, 9);
    const mode = bandPass(29, 5, 800)(impulse(4096));
    expect(magnitude(responseAt(at(0), mode))).toBeCloseTo(0, 9);
    expect(magnitude(responseAt(at(29), mode))).toBeCloseTo(1, 9);
  });
});

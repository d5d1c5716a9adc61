import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { frequencyResponse, magnitudeDecibels } from '../../../core/figures/frequencyResponse';
import { needs, python } from '../../support/programs';
import { normals } from '../../support/random';

const points = 33;

function magnitude(coefficients: number[]): Float64Array {
  return magnitudeDecibels(frequencyResponse(coefficients, points)).map((db) => 10 ** (db / 20));
}

describe('frequencyResponse', () => {
  it('is 1 for an impulse, whatever its delay', () => {
    for (const value of magnitude([0, 0, 1, 0])) expect(value).toBeCloseTo(1, 14);
  });

  it('is cos(πf) for the mean of two samples and 2 sin(πf) for their difference (trigonometric identities)', () => {
    const mean = magnitude([0.5, 0.5]);
    const difference = magnitude([1, -1]);
    for (let i = 0; i < points; i++) {
      const half = (Math.PI * i) / (2 * (points - 1));
      expect(mean[i]).toBeCloseTo(Math.cos(half), 14);
      expect(difference[i]).toBeCloseTo(2 * Math.sin(half), 14);
    }
  });

  it('has the phase of a delay: e^(-2πifk)', () => {
    const { real, imaginary } = frequencyResponse([0, 0, 0, 1], points);
    const angle = (-2 * Math.PI * 3 * 5) / (2 * (points - 1));
    expect(real[5]).toBeCloseTo(Math.cos(angle), 14);
    expect(imaginary[5]).toBeCloseTo(Math.sin(angle), 14);
  });

  it.skipIf(!needs('scipy'))('agrees with scipy.signal.freqz for 200 random taps', () => {
    const taps = Array.from(normals(11, 200));
    const script = `import json, sys, numpy, scipy.signal
w, h = scipy.signal.freqz(json.load(sys.stdin), worN=numpy.linspace(0, numpy.pi, ${points}))
print(json.dumps([h.real.tolist(), h.imag.tolist()]))`;
    const printed = execFileSync(python, ['-c', script], { input: JSON.stringify(taps), encoding: 'utf8' });
    const [real, imaginary] = JSON.parse(printed) as number[][];
    const ours = frequencyResponse(taps, points);
    for (let i = 0; i < points; i++) {
      expect(Math.abs(ours.real[i] - real[i])).toBeLessThan(1e-11);
      expect(Math.abs(ours.imaginary[i] - imaginary[i])).toBeLessThan(1e-11);
    }
  });
});

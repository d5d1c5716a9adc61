import { describe, expect, it } from 'vitest';
import pairing from '../../media/bench/belt.pairing.json';
import { beltRate, pathOfX, pathOfZ } from './beltPlant';
import { beltScenario, beltTakes } from './beltScenario';
import { impulse } from './filters';
import { heldOutErrors } from './heldOutError';
import { load } from './packages';
import { transducerNoise, tubingScenario } from './tubingScenario';
import { flowNoise, valvePath, valveScenario } from './valveScenario';

const energy = (signal: Float64Array) => signal.reduce((sum, value) => sum + value * value, 0);
const largest = (signal: Float64Array) => signal.reduce((most, value) => Math.max(most, Math.abs(value)), 0);

/** Share of a response's energy outside taps `[from, to)`, in dB. */
function outside(response: Float64Array, from: number, to: number): number {
  return 10 * Math.log10(1 - energy(response.subarray(from, to)) / energy(response));
}

describe('the belt', () => {
  it('carries no package where the document says so, and a whole one in each held-out interval', () => {
    beltTakes.forEach(({ packages, speed }, t) => {
      const take = pairing.takes[t];
      const kilograms = load(packages, speed, beltRate, 24 * beltRate);
      const part = ({ from, to }: { from: number; to: number }) =>
        kilograms.subarray(Math.round(from * beltRate), Math.round(to * beltRate));
      for (const interval of [...take.disturbanceOnly, ...[take.fit].flat()]) {
        expect(largest(part(interval))).toBe(0);
      }
      expect(largest(part(take.heldOut))).toBeGreaterThan(2);
    });
  });

  it('stays inside 16-bit counts', () => {
    for (const { inputs, desired } of beltScenario().takes) {
      for (const signal of [...inputs, desired]) expect(largest(signal)).toBeLessThan(32000);
    }
  });

  it('has paths that 64 taps hold to within the sensors’ noise', () => {
    expect(outside(pathOfX(impulse(1024)), 0, 64)).toBeLessThan(-40);
    expect(outside(pathOfZ(impulse(1024)), 0, 64)).toBeLessThan(-40);
  });
});

describe('the valve', () => {
  it('has ten samples of dead time and dies away inside the document’s taps', () => {
    const path = valvePath(impulse(1024));
    expect(path.findIndex((value) => value !== 0)).toBe(10);
    expect(outside(path, 8, 136)).toBeLessThan(-60);
  });

  it('leaves the flow meter’s noise alone behind the true path', () => {
    const { takes, idealRows, delay } = valveScenario();
    const [{ errorEnergy }] = heldOutErrors(takes, idealRows, delay);
    const deviation = Math.sqrt(errorEnergy / 5000);
    expect(deviation / flowNoise).toBeGreaterThan(0.96);
    expect(deviation / flowNoise).toBeLessThan(1.08);
  });
});

describe('the tubing', () => {
  const { takes, idealRows, delay } = tubingScenario();

  it('clips neither transducer', () => {
    expect(largest(takes[0].inputs[0])).toBeLessThan(0.9);
    expect(largest(takes[0].desired)).toBeLessThan(0.9);
  });

  it('cannot be undone below the flush transducer’s own noise', () => {
    const [{ errorEnergy }] = heldOutErrors(takes, idealRows, delay);
    expect(Math.sqrt(errorEnergy / (4 * 8000))).toBeGreaterThan(transducerNoise);
  });
});

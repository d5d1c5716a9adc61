import { describe, expect, it } from 'vitest';
import { impulse, scaled, secondOrder } from './filters';
import { correlation, type LinearModel, wienerFilter } from './linearModel';
import { rotation } from './phasor';

describe('wienerFilter', () => {
  it('solves a first-order process in white noise (Hayes, Statistical Digital Signal Processing, ch. 7, from memory)', () => {
    const one = impulse(400);
    const process = secondOrder({ b0: 0.6, b1: 0, b2: 0, a1: -0.8, a2: 0 })(one);
    const model: LinearModel = {
      white: [{ responses: [process, process] }, { responses: [one, scaled(0)(one)] }],
      lines: [],
    };
    for (let shift = -3; shift <= 3; shift++) {
      expect(correlation(model, 0, 1, shift)).toBeCloseTo(0.8 ** Math.abs(shift), 12);
    }
    const [taps] = wienerFilter([{ model, weight: 1 }], { inputs: 1, length: 2, delay: 0 });
    expect(taps[0]).toBeCloseTo(0.4047619, 7);
    expect(taps[1]).toBeCloseTo(0.2380952, 7);
  });

  it('turns a sine into twice its cosine (Widrow & Stearns, Adaptive Signal Processing, ch. 2, from memory)', () => {
    const turn = rotation(1, 5);
    const gains = [
      { re: 0, im: -1 },
      { re: 2, im: 0 },
    ];
    const model: LinearModel = { white: [], lines: [{ turn, gains }] };
    const [taps] = wienerFilter([{ model, weight: 1 }], { inputs: 1, length: 2, delay: 0 });
    const angle = (2 * Math.PI) / 5;
    expect(taps[0]).toBeCloseTo(2 / Math.tan(angle), 12);
    expect(taps[1]).toBeCloseTo(-2 / Math.sin(angle), 12);
  });

  it('copies a delayed input by one tap at the delay, from two inputs', () => {
    const one = impulse(8);
    const none = new Float64Array(8);
    const model: LinearModel = {
      white: [{ responses: [one, none, none] }, { responses: [none, one, scaled(3)(one)] }],
      lines: [],
    };
    const rows = wienerFilter([{ model, weight: 2 }], { inputs: 2, length: 4, delay: 2 });
    expect(rows).toEqual([
      [0, 0, 0, 0],
      [0, 0, 3, 0],
    ]);
  });
});

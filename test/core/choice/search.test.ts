import { describe, expect, it } from 'vitest';
import type { Grid } from '../../../core/choice/grid';
import { newPace, Stopped } from '../../../core/pace';
import { bandFilter } from '../../../core/pair/bandFilter';
import { takeOf } from '../../support/takes';
import { largestGap, pathTake, searched } from './refilter';

// Errors of candidates against fitting on the rest by the main job's own functions and filtering the left-out blocks
// sample by sample.

const grid: Grid = { lengths: [1, 20, 33], delays: [-5, 0, 3], regularisations: [1e-8, 0.01] };

describe('errors of candidates', () => {
  it.each([
    ['-15 dB', 0.18, 1e-9],
    ['-30 dB', 0.03, 1e-9],
    ['-60 dB', 0.001, 1e-6],
  ])('equal those of filtering the left-out blocks at an NMSE of %s', async (_, noise, tolerance) => {
    const [x, d] = pathTake(1, 3000, noise);
    const { gap, nmseDb } = await largestGap({ takes: [takeOf([x], d)], grid });
    expect(nmseDb).toBeGreaterThan(20 * Math.log10(noise) - 4);
    expect(nmseDb).toBeLessThan(20 * Math.log10(noise) + 4);
    expect(gap).toBeLessThan(tolerance);
  });

  it('do so with several inputs, and fit intervals with a gap between them', async () => {
    const [x, d] = pathTake(2, 4000, 0.05);
    const [y, more] = pathTake(3, 4000, 0.05);
    const take = takeOf(
      [x, y],
      d.map((value, n) => value + more[n]),
      {
        fit: [
          { from: 100, to: 1700 },
          { from: 1900, to: 3900 },
        ],
      },
    );
    const { gap } = await largestGap({ takes: [take], grid: { ...grid, lengths: [2, 20] } });
    expect(gap).toBeLessThan(1e-9);
  });

  it('do so with several takes', async () => {
    const takes = [5, 6, 7].map((seed) => {
      const [x, d] = pathTake(seed, 1500, 0.05);
      return takeOf([x], d, { fit: [{ from: 0, to: 1200 }], heldOut: [{ from: 1200, to: 1500 }] });
    });
    const { gap } = await largestGap({ takes, grid: { ...grid, lengths: [5, 24] } });
    expect(gap).toBeLessThan(1e-9);
  });

  it('do so with delays beyond the length, whose history is longer than that of the inputs', async () => {
    const [x, d] = pathTake(8, 3000, 0.05);
    const wide = { ...grid, lengths: [1, 3], delays: [-30, -10, 15] };
    const { gap } = await largestGap({ takes: [takeOf([x], d)], grid: wide });
    expect(gap).toBeLessThan(1e-9);
  });

  it('do so where the error is weighted to a band', async () => {
    const [x, d] = pathTake(10, 4000, 0.05);
    const band = bandFilter({ from: 100, to: 300 }, 1000);
    if ('code' in band) throw new Error(band.code);
    const few = { ...grid, lengths: [5, 24], delays: [-2, 0] };
    const { gap } = await largestGap({ takes: [takeOf([x], d)], grid: few, band });
    expect(gap).toBeLessThan(1e-9);
    // Six pairs of columns: 200 taps take the structured method.
    const many = { ...grid, lengths: [8, 200], delays: [0, 1] };
    const long = await largestGap({ takes: [takeOf([x], d)], grid: many, band });
    expect(long.gap).toBeLessThan(1e-9);
  });
});

describe('the search', () => {
  const [x, d] = pathTake(9, 2000, 0.1);
  const take = takeOf([x], d);

  it('gives the curves of each regularisation as soon as they are known, the asked one first', async () => {
    const seen: { rho: number; known: number }[] = [];
    const { result } = await searched(
      { takes: [take], grid },
      {
        first: 1,
        onCurves: (soFar, rho) =>
          seen.push({ rho, known: soFar.errors.filter((error) => !Number.isNaN(error)).length }),
      },
    );
    const all = result.errors.length;
    expect(seen).toEqual([
      { rho: 1, known: all / 2 },
      { rho: 0, known: all },
    ]);
  });

  it('stops where it is told to', async () => {
    let steps = 0;
    const stopping = newPace(() => ++steps > 5);
    await expect(searched({ takes: [take], grid }, { pace: stopping })).rejects.toThrow(Stopped);
  });

  it('leaves out what cannot be solved and goes on with what can', async () => {
    // Whole periods of a sine, without a mean, span two dimensions: three taps without regularisation cannot be solved.
    const sine = Float64Array.from({ length: 2000 }, (_, n) => Math.sin((Math.PI * n) / 20));
    const given = { lengths: [1, 2, 3, 8], delays: [0], regularisations: [0, 1e-3] };
    const { result, folds } = await searched({
      takes: [
        takeOf(
          [sine],
          sine.map((v) => 2 * v),
        ),
      ],
      grid: given,
    });
    const known = given.lengths.map((_, l) =>
      given.regularisations.map((_rho, r) => !Number.isNaN(result.errors[(2 * l + r) * folds.blocks])),
    );
    expect(known).toEqual([
      [true, true],
      [true, true],
      [false, true],
      [false, true],
    ]);
  });
});

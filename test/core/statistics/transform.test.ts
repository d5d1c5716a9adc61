import { describe, expect, it } from 'vitest';
import { cosineAt, quarterCosines } from '../../../core/statistics/cosines';
import { conjugatePlace, frequencyAt, transformOf } from '../../../core/statistics/transform';
import { seededNormal } from '../../support/random';

function directTransform(re: Float64Array, im: Float64Array): { re: number; im: number }[] {
  const n = re.length;
  return Array.from({ length: n }, (_, f) => {
    let sumRe = 0;
    let sumIm = 0;
    for (let k = 0; k < n; k++) {
      const angle = (-2 * Math.PI * ((f * k) % n)) / n;
      sumRe += re[k] * Math.cos(angle) - im[k] * Math.sin(angle);
      sumIm += re[k] * Math.sin(angle) + im[k] * Math.cos(angle);
    }
    return { re: sumRe, im: sumIm };
  });
}

describe('quarterCosines', () => {
  it.each([4, 8, 64, 4096, 1 << 20])('equals Math.cos for size %i', (size) => {
    const table = quarterCosines(size);
    let worst = 0;
    for (let k = 0; k <= size / 4; k++) {
      worst = Math.max(worst, Math.abs(table[k] - Math.cos((2 * Math.PI * k) / size)));
    }
    expect(worst).toBeLessThan(0.5e-16 * Math.log2(Math.max(size, 16)));
    for (const k of [-7, -1, 0, 1, size / 2, size - 1, size + 3]) {
      expect(cosineAt(table, k)).toBeCloseTo(Math.cos((2 * Math.PI * k) / size), 14);
    }
  });
});

describe('transformOf', () => {
  it.each([4, 8, 16, 32, 64, 128, 256, 512, 1024, 2048, 4096])(
    'equals the defining sum for size %i',
    (size) => {
      const random = seededNormal(size);
      const re = Float64Array.from({ length: size }, random);
      const im = Float64Array.from({ length: size }, random);
      const wanted = directTransform(re, im);
      const gotRe = re.slice();
      const gotIm = im.slice();
      const transform = transformOf(size);
      transform.forward(gotRe, gotIm);
      let worst = 0;
      for (let p = 0; p < size; p++) {
        const want = wanted[frequencyAt(p, size)];
        worst = Math.max(worst, Math.abs(gotRe[p] - want.re), Math.abs(gotIm[p] - want.im));
        expect(frequencyAt(conjugatePlace(p), size)).toBe((size - frequencyAt(p, size)) % size);
      }
      expect(worst / Math.sqrt(size)).toBeLessThan(1e-13);
      transform.inverse(gotRe, gotIm);
      worst = 0;
      for (let k = 0; k < size; k++) {
        worst = Math.max(worst, Math.abs(gotRe[k] - re[k]), Math.abs(gotIm[k] - im[k]));
      }
      expect(worst).toBeLessThan(1e-14);
    },
  );
});

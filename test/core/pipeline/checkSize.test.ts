import { describe, expect, it } from 'vitest';
import { checkPair } from '../../../core/pipeline/checkPair';
import type { Pairing } from '../../../core/pipeline/pairing';
import { takeOf } from '../../support/takes';

const samples = 100_000;
const signal = new Float64Array(samples);

/** What `checkPair` looks at of a pairing of one take. */
function pairing(filter: object, inputs = 1, intervals = 1): Pairing {
  const each = Math.floor(samples / intervals);
  const fit = Array.from({ length: intervals }, (_, i) => ({ from: i * each, to: (i + 1) * each - 1 }));
  const take = takeOf(
    Array.from({ length: inputs }, () => signal),
    signal,
    { fit },
  );
  const whole = { delay: 0, symmetry: 'none', windowing: 'covariance', ...filter };
  const document = { filter: whole, prepare: { band: null } };
  return { document, takes: [take], recordings: new Map(), sampleRate: 1000 } as unknown as Pairing;
}

const codes = (...args: Parameters<typeof pairing>) => checkPair(pairing(...args)).map(({ code }) => code);

describe('how many taps a filter may have', () => {
  it('up to 8,192 in all whatever is asked of them', () => {
    expect(codes({ length: 8192, symmetry: 'even' })).toEqual([]);
    expect(codes({ length: 1000 }, 1, 60)).toEqual([]);
  });

  it('up to 65,536 where neither symmetry nor many stretches stand in the way', () => {
    expect(codes({ length: 40_000 })).toEqual([]);
    expect(codes({ length: 9000 }, 3, 2)).toEqual([]);
    expect(codes({ length: 9000 }, 8)).toEqual(['too-many-taps']);
    expect(codes({ length: 8193, symmetry: 'odd' })).toEqual(['too-many-mirrored']);
  });

  it('with many stretches only where their edges do not count', () => {
    const [found] = checkPair(pairing({ length: 700 }, 12, 60));
    expect(found).toMatchObject({ code: 'too-many-stretches', severity: 'blocker' });
    expect(found.values).toMatchObject({ unknowns: 8400, stretches: 60, limit: 8192, most: 32 });
    expect(codes({ length: 700, windowing: 'autocorrelation' }, 12, 60)).toEqual([]);
  });
});

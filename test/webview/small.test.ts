import { afterEach, describe, expect, it } from 'vitest';
import type { TakeView } from '../../core/protocol/views';
import { droppedFiles } from '../../webview/dropped';
import {
  decibels,
  decibelsWithError,
  macsPerSecond,
  partsPerMillion,
  regularisationDb,
} from '../../webview/figures';
import { freeStretch } from '../../webview/freeStretch';
import { canBeHeard, largestOf, toSound } from '../../webview/listen/scale';
import { setWords, t } from '../../webview/words';

describe('words', () => {
  afterEach(() => setWords({}));

  it('fills in values, in the language that is set', () => {
    expect(t('{0} of {1}', 2, 'three')).toBe('2 of three');
    expect(t('{0} and {0}', 'a')).toBe('a and a');
    setWords({ '{0} of {1}': '{1} sind {0}' });
    expect(t('{0} of {1}', 2, 3)).toBe('3 sind 2');
    expect(t('untranslated')).toBe('untranslated');
  });

  it('leaves braces of values alone', () => {
    expect(t('{0}, {1}', '{1}', 'b')).toBe('{1}, b');
  });
});

describe('figures', () => {
  it('have a unit and as many digits as they deserve', () => {
    expect(decibels(-23.449)).toBe('−23.4 dB');
    expect(decibels(-0.001)).toBe('0.0 dB');
    expect(decibels(null)).toBe('–');
    expect(decibels(Number.NEGATIVE_INFINITY)).toBe('−∞ dB');
    expect(decibelsWithError(-23.44, 0.26)).toBe('−23.4 ± 0.3 dB');
    expect(regularisationDb(1e-4)).toBe('−40.0 dB');
    expect(regularisationDb(0)).toBe('none');
    expect(macsPerSecond(128_000)).toBe('128 kMAC/s');
    expect(partsPerMillion(-14.23, 2.1)).toBe('−14.2 ± 2.1 ppm');
  });
});

describe('sound', () => {
  it('is scaled to its loudest value and silent where there is none', () => {
    expect([...toSound(Float64Array.of(2, -4, Number.NaN), 4)]).toEqual([0.5, -1, 0]);
    expect([...toSound(Float64Array.of(0, 0), 0)]).toEqual([0, 0]);
    expect(largestOf([Float64Array.of(1, -3), Float64Array.of(Number.POSITIVE_INFINITY)])).toBe(3);
  });

  it('is offered from 8 to 192 kHz', () => {
    expect([null, 800, 8000, 192_000, 250_000].map(canBeHeard)).toEqual([false, false, true, true, false]);
  });
});

describe('dropped files', () => {
  it('are named by addresses or by the desktop', () => {
    expect(droppedFiles('file:///a/slow%20belt.csv\r\n# no\r\nvscode-vfs://x/b.wav?q', [])).toEqual([
      'slow belt.csv',
      'b.wav',
    ]);
    expect(droppedFiles('', [{ name: 'c.npy' }])).toEqual(['c.npy']);
    expect(droppedFiles('file:///bad%E0%A4', [])).toEqual(['bad%E0%A4']);
  });
});

describe('the longest free stretch', () => {
  const take: TakeView = {
    name: 'a',
    samples: 100,
    tracks: [],
    fit: [{ from: 10, to: 50 }],
    heldOut: [{ from: 80, to: 100 }],
    disturbanceOnly: [{ from: 0, to: 20 }],
  };

  it('overlaps no interval of the kinds that may not overlap', () => {
    expect(freeStretch(take, 'fit')).toEqual({ from: 50, to: 80 });
    expect(freeStretch(take, 'disturbanceOnly')).toEqual({ from: 20, to: 100 });
    expect(freeStretch({ ...take, fit: [{ from: 0, to: 80 }] }, 'heldOut')).toBeNull();
  });
});

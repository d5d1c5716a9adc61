import { assert, property, string } from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decibels, powerDecibels, roundedDecibels } from '../../../core/figures/decibels';
import { fixed, grouped, significant, typed } from '../../../core/figures/numbers';
import { duration, frequency, intervals, memory, samplesAndTime } from '../../../core/figures/units';
import { visible } from '../../../core/figures/visible';

describe('numbers for the reader', () => {
  it.each([
    [0, '0'],
    [-0, '0'],
    [79937, '79,937'],
    [-1234567, '-1,234,567'],
    [0.0123456789, '0.01235'],
    [123.456, '123.5'],
    [-9811.7, '-9,812'],
    [1234.5678, '1,235'],
    [0.00001234567, '1.235e-5'],
    [-12345678.9, '-1.235e7'],
    [Number.NaN, '–'],
    [Number.NEGATIVE_INFINITY, '-∞'],
  ])('shows %d as %s', (value, text) => {
    expect(significant(value)).toBe(text);
  });

  it('shows thousands of big integers, nothing as a dash, and never minus zero', () => {
    expect(grouped(-9223372036854775808n)).toBe('-9,223,372,036,854,775,808');
    expect(grouped(999)).toBe('999');
    expect(significant(null)).toBe('–');
    expect(fixed(-0.001, 2)).toBe('0.00');
    expect([typed(2048), typed(0.1 + 0.2), typed(-1 / 3)]).toEqual(['2048', '0.3', '-0.333333333']);
  });
});

describe('decibels', () => {
  it('has two digits in files and one where asked', () => {
    expect([decibels(-30.827), decibels(-30.827, 1), decibels(-0.001)]).toEqual([
      '-30.83 dB',
      '-30.8 dB',
      '0.00 dB',
    ]);
    expect([decibels(null), decibels(Number.NEGATIVE_INFINITY)]).toEqual(['–', '-∞ dB']);
    expect([
      roundedDecibels(-30.827),
      roundedDecibels(-0.001),
      roundedDecibels(Number.NaN),
      roundedDecibels(null),
    ]).toEqual([-30.83, 0, null, null]);
    expect(powerDecibels(0.001)).toBeCloseTo(-30, 12);
  });
});

describe('units', () => {
  it('chooses the unit by the size', () => {
    expect([62.5, 999.99, 1250, 22050, 2e6].map(frequency)).toEqual([
      '62.5 Hz',
      '999.99 Hz',
      '1.25 kHz',
      '22.05 kHz',
      '2 MHz',
    ]);
    expect([0, 1 / 48000, 0.0025, 1, 40.5].map(duration)).toEqual([
      '0 s',
      '0.02083 ms',
      '2.5 ms',
      '1 s',
      '40.5 s',
    ]);
    expect([1, 256, 65536].map(memory)).toEqual(['1 byte', '256 bytes', '64 KiB']);
    expect(samplesAndTime(1, 2000)).toBe('1 sample (0.5 ms)');
  });

  it('gives intervals in seconds and samples', () => {
    expect(intervals([{ from: 0, to: 80000 }], 2000)).toBe('0 s to 40 s (samples 0 to 80,000)');
    expect(intervals([], 2000)).toBe('none');
  });
});

describe('visible', () => {
  it('spells out what cannot be seen and leaves the rest', () => {
    expect(visible('a\nb\u202Ec\u0000 ö漢\u{1F39B}')).toBe('a\\u000ab\\u202ec\\u0000 ö漢\u{1F39B}');
  });

  it('leaves no control or format character and no half of a pair in any text', () => {
    assert(property(string({ unit: 'binary' }), (text) => !/[\p{C}\p{Zl}\p{Zp}]/u.test(visible(text))));
  });
});

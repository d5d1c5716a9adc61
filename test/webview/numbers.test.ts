import { describe, expect, it } from 'vitest';
import { checkNumber, checkNumbers, fieldText, parseNumber, rangeInWords } from '../../webview/numbers';

describe('numbers in fields', () => {
  it.each([
    ['64', 64],
    [' 1,5 ', 1.5],
    ['1.5', 1.5],
    ['-3', -3],
    ['−3', -3],
    ['1e-4', 1e-4],
    ['1,5e−4', 1.5e-4],
    [',5', 0.5],
    ['2.', 2],
    ['+7', 7],
  ])('reads %s', (text, value) => {
    expect(parseNumber(text)).toBe(value);
  });

  it.each(['', 'taps', '1.234,5', '1,234.5', '1,2,3', '1 000', '0x10', '1e', 'Infinity', 'NaN', '1e999'])(
    'refuses %s',
    (text) => {
      expect(parseNumber(text)).toBeNull();
    },
  );

  it('says what is wrong', () => {
    const length = { min: 1, max: 65_536, whole: true };
    expect(checkNumber('64', length)).toEqual({ value: 64 });
    expect(checkNumber('', length)).toEqual({ error: 'Nothing is given when a number is expected.' });
    expect(checkNumber('long', length)).toEqual({ error: 'Got long when a number is expected.' });
    expect(checkNumber('1.5', length)).toEqual({ error: 'Got 1.5 when a whole number is expected.' });
    expect(checkNumber('0', length)).toEqual({ error: 'Got 0 when 1 to 65,536 is expected.' });
    expect(checkNumber('0', { min: 0, above: true, max: 5 })).toEqual({
      error: 'Got 0 when above 0, up to 5 is expected.',
    });
  });

  it('does not take a thousand, as figures are shown, for a decimal comma', () => {
    const amplitude = { min: 0, above: true, max: 1e30 };
    const twofold = { error: '32,768 can be read in two ways. Write 32768 or 32.768.' };
    expect(checkNumber('32,768', amplitude)).toEqual(twofold);
    expect(checkNumbers('1; 32,768', amplitude)).toEqual(twofold);
    expect(checkNumber('−1,000', { min: -2e3, max: 2e3 })).toHaveProperty('error');
    for (const text of ['1,000', '1.000']) {
      expect(checkNumber(text, { min: 0, max: 65_536, whole: true })).toEqual({
        error: `Got ${text} when a whole number without separators is expected: 1000.`,
      });
    }
    expect(checkNumber('0,125', amplitude)).toEqual({ value: 0.125 });
    expect(checkNumber('32,76', amplitude)).toEqual({ value: 32.76 });
    expect(checkNumber('32.768', amplitude)).toEqual({ value: 32.768 });
  });

  it('lets an optional field be empty and knows no negative zero', () => {
    expect(checkNumber(' ', { min: 0, max: 1, optional: true })).toEqual({ value: null });
    expect(Object.is((checkNumber('-0', { min: -1, max: 1 }) as { value: number }).value, 0)).toBe(true);
  });

  it('reads lists with decimal commas', () => {
    const rule = { min: 0, above: true, max: 1e30 };
    expect(checkNumbers('1; 2,5 ;4', rule)).toEqual({ value: [1, 2.5, 4] });
    expect(checkNumbers('1 2', rule)).toEqual({ value: [1, 2] });
    expect(checkNumbers('', rule)).toEqual({ value: null });
    expect(checkNumbers('1; 0', rule)).toHaveProperty('error');
  });

  it('shows a value so that it reads back the same', () => {
    for (const value of [0, 64, -8, 0.1, 1e-4, 1.25e-6, 123456.789, 1e30, 1e-300]) {
      expect(parseNumber(fieldText(value))).toBe(value);
    }
    expect(fieldText(1e-6)).toBe('1e-6');
    expect(fieldText(null)).toBe('');
  });

  it('says ranges', () => {
    expect(rangeInWords({ min: 1, max: 65_536 })).toBe('1 to 65,536');
    expect(rangeInWords({ min: 0, max: 1e12 })).toBe('0 or more');
    expect(rangeInWords({ min: -1e12, max: 1e12 })).toBe('any number');
  });
});

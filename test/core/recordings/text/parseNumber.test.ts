import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseNumber } from '../../../../core/recordings/text/parseNumber';

// Reference: the platform's own Number(), which ECMA-262 wants rounded to the nearest double up to the 20th digit and
// which engines round correctly throughout.

const point = 46;
const comma = 44;

/** The text among others, so that a look beyond its ends shows. */
function parse(text: string, decimal = point, around = '9'): number | undefined {
  const bytes = new TextEncoder().encode(around + text + around);
  return parseNumber(bytes, around.length, bytes.length - around.length, decimal);
}

function expectSame(text: string): void {
  const wanted = Number(text);
  for (const around of ['9', '-', 'e', '.', ',', '']) {
    if (!Object.is(parse(text, point, around), wanted))
      expect(`${text}: ${parse(text)}`).toBe(`${text}: ${wanted}`);
  }
  const withComma = parse(text.replace('.', ','), comma);
  if (!Object.is(withComma, wanted)) expect(`${text} with comma: ${withComma}`).toBe(`${text}: ${wanted}`);
}

const finite = fc.double({ noNaN: true, noDefaultInfinity: true });
const digits = (min: number, max: number) =>
  fc.array(fc.integer({ min: 0, max: 9 }), { minLength: min, maxLength: max }).map((list) => list.join(''));
const sign = fc.constantFrom('', '-', '+');
const runs = { numRuns: 5000, seed: 7 };

describe('parseNumber', () => {
  it('reads what String() writes', () => {
    fc.assert(
      fc.property(finite, (value) => expectSame(String(value))),
      runs,
    );
  });

  it('reads what toFixed, toExponential and toPrecision write', () => {
    fc.assert(
      fc.property(finite, fc.integer({ min: 0, max: 100 }), (value, places) => {
        expectSame(value.toFixed(places));
        expectSame(value.toExponential(places));
        expectSame(value.toPrecision(Math.max(1, places)));
      }),
      runs,
    );
  });

  it('reads values of measured size in few digits, where it computes by itself', () => {
    const small = fc.double({ min: -1e7, max: 1e7, noNaN: true });
    fc.assert(
      fc.property(small, fc.integer({ min: 0, max: 12 }), (value, places) => {
        expectSame(value.toFixed(places));
        expectSame(value.toExponential(places));
      }),
      runs,
    );
  });

  it('reads random digits with and without a point and an exponent', () => {
    const exponent = fc.oneof(
      fc.constant(''),
      fc.integer({ min: -30, max: 30 }).map((e) => `e${e}`),
      fc.integer({ min: -400, max: 400 }).map((e) => `E${e < 0 ? e : `+${e}`}`),
      fc.integer({ min: 0, max: 30 }).map((e) => `e-000${e}`),
    );
    fc.assert(
      fc.property(sign, digits(1, 25), digits(0, 25), fc.boolean(), exponent, (s, whole, part, dot, e) => {
        expectSame(`${s}${whole}${dot ? `.${part}` : ''}${e}`);
        if (part !== '') expectSame(`${s}.${part}${e}`);
      }),
      { numRuns: 20_000, seed: 8 },
    );
  });

  it.each([
    // Halfway between two doubles, and one digit more (from Paxson, "A Program for Testing IEEE Decimal–Binary
    // Conversion", 1991, and the edges of IEEE 754).
    '9007199254740993',
    '9007199254740993.0000000000000000000000001',
    '5e-324',
    '2.4703282292062327e-324',
    '2.4703282292062328e-324',
    '2.2250738585072011e-308',
    '1.7976931348623158e308',
    '1.7976931348623159e308',
    '5e125',
    '69e267',
    '999e-26',
    '7861e-34',
    '75569e-254',
    '999999999999999e22',
    '999999999999999e-22',
    '999999999999999e23',
    '0e999999',
    '-0',
    '-0.0e5',
    '1e0000000000000000001',
    '000000000000000000000000000000123.5',
    `0.${'0'.repeat(60)}1`,
    `1${'0'.repeat(60)}`,
  ])('reads %s', expectSame);

  it('reads exponents of d and D as those of e', () => {
    for (const text of ['1d-3', '1D+5', '-2.5d2', '123456789012345678d-3', '1d300']) {
      expect(parse(text)).toBe(Number(text.replace(/d/i, 'e')));
    }
  });

  it('knows words for what is no finite number', () => {
    for (const text of ['', 'nan', 'NaN', 'NAN', '+nan', '-NaN']) expect(parse(text)).toBeNaN();
    for (const text of ['inf', 'Inf', '+INF', 'infinity']) expect(parse(text)).toBe(Number.POSITIVE_INFINITY);
    for (const text of ['-inf', '-Infinity']) expect(parse(text)).toBe(Number.NEGATIVE_INFINITY);
  });

  it.each(
    '1e,1e+,1e-,e5,--1,+-1,-+1,1-,1+1,1.2.3,..1,1..,.,-,+,+.,.e5,0x10,0b1,0o7,1_000,1 000,12a,a12,nan1,in,infi,nane,1e5.5,1e5e5,1ee5,1de5,1f,1n,#1,$1,1%,٣,½,1e٣,constructor,__proto__,-constructor,toString'.split(
      ',',
    ),
  )('takes "%s" for no number', (text) => {
    expect(parse(text)).toBeUndefined();
    expect(parse(text, point, '')).toBeUndefined();
  });

  it('takes the other decimal sign for none', () => {
    for (const text of ['1,5', '1.234,5', ',5', '1,']) expect(parse(text)).toBeUndefined();
    for (const text of ['1.5', '1,234.5', '.5', '1.', '1,5,2', '1,5e1,5'])
      expect(parse(text, comma)).toBeUndefined();
  });
});

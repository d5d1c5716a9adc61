const powers = Float64Array.of(
  1,
  1e1,
  1e2,
  1e3,
  1e4,
  1e5,
  1e6,
  1e7,
  1e8,
  1e9,
  1e10,
  1e11,
  1e12,
  1e13,
  1e14,
  1e15,
  1e16,
  1e17,
  1e18,
  1e19,
  1e20,
  1e21,
  1e22,
);

const shape = /^[+-]?(\d+\.?\d*|\.\d+)([eEdD][+-]?\d+)?$/;
const words: Record<string, number> = {
  nan: Number.NaN,
  inf: Number.POSITIVE_INFINITY,
  infinity: Number.POSITIVE_INFINITY,
};

/**
 * The number in `bytes[start, end)`, with no blanks around it, bit for bit what `Number()` makes of it.
 * Up to 15 digits and powers of ten up to 22 the mantissa and the power are exact doubles, so that one multiplication or
 * division rounds once; everything else goes through `Number()`. Fortran's exponent letters d and D count as e;
 * an empty cell and `nan` are NaN, `inf` and `infinity` are infinite.
 * @param decimal code of the decimal sign
 * @returns undefined where it is no number
 */
export function parseNumber(
  bytes: Uint8Array,
  start: number,
  end: number,
  decimal: number,
): number | undefined {
  let i = start;
  let negative = false;
  if (bytes[i] === 45 || bytes[i] === 43) negative = bytes[i++] === 45;
  let mantissa = 0;
  let digits = 0;
  let seen = 0;
  let places = 0;
  let point = false;
  for (; i < end; i++) {
    const digit = bytes[i] - 48;
    if (digit >= 0 && digit <= 9) {
      mantissa = 10 * mantissa + digit;
      seen++;
      if (digits > 0 || digit > 0) digits++;
      if (point) places++;
    } else if (bytes[i] === decimal && !point) point = true;
    else break;
  }
  if (seen === 0 || digits > 15) return parseSlowly(bytes, start, end, decimal);
  let exponent = -places;
  if (i < end) {
    const written = parseExponent(bytes, i, end);
    if (written === undefined) return parseSlowly(bytes, start, end, decimal);
    exponent += written;
  }
  if (exponent < -22 || exponent > 22) return parseSlowly(bytes, start, end, decimal);
  const value = exponent < 0 ? mantissa / powers[-exponent] : mantissa * powers[exponent];
  return negative ? -value : value;
}

/** `e-3` and the like, of at most three digits. */
function parseExponent(bytes: Uint8Array, start: number, end: number): number | undefined {
  // Setting bit 5 makes letters small: e or d.
  const letter = bytes[start] | 32;
  if (letter !== 101 && letter !== 100) return undefined;
  const signed = bytes[start + 1] === 45 || bytes[start + 1] === 43;
  const from = start + (signed ? 2 : 1);
  if (from >= end || end - from > 3) return undefined;
  let value = 0;
  for (let i = from; i < end; i++) {
    const digit = bytes[i] - 48;
    if (digit < 0 || digit > 9) return undefined;
    value = 10 * value + digit;
  }
  return bytes[start + 1] === 45 ? -value : value;
}

function parseSlowly(bytes: Uint8Array, start: number, end: number, decimal: number): number | undefined {
  if (end === start) return Number.NaN;
  if (end - start > 512) return undefined;
  let text = String.fromCharCode(...bytes.subarray(start, end));
  if (decimal !== 46) {
    if (text.includes('.')) return undefined;
    text = text.replace(String.fromCharCode(decimal), '.');
  }
  if (shape.test(text)) return Number(text.replace(/[dD]/, 'e'));
  const sign = /^[+-]/.exec(text)?.[0] ?? '';
  const word = text.slice(sign.length).toLowerCase();
  if (!Object.hasOwn(words, word)) return undefined;
  return sign === '-' ? -words[word] : words[word];
}

/** Shown where there is no figure. */
export const noFigure = '–';

/** A number, without an exponent, with commas between thousands: `79,937`. */
export function grouped(value: number | bigint | string): string {
  const [whole, ...fraction] = String(value).split('.');
  return [whole.replace(/\B(?=(\d{3})+$)/g, ','), ...fraction].join('.');
}

/**
 * A number for the reader: whole numbers exactly, others to `digits` significant digits without trailing zeros,
 * with an exponent below 0.0001 and from a million on.
 */
export function significant(value: number | null, digits = 4): string {
  if (value === null || Number.isNaN(value)) return noFigure;
  if (!Number.isFinite(value)) return value > 0 ? '∞' : '-∞';
  const size = Math.abs(value);
  if (Number.isInteger(value) && size < 1e15) return grouped(value === 0 ? 0 : value);
  if (size >= 1e-4 && size < 1e6) return grouped(String(Number(value.toPrecision(digits))));
  const [mantissa, exponent] = value.toExponential(digits - 1).split('e');
  return `${Number(mantissa)}e${Number(exponent)}`;
}

/** A number to nine significant digits without commas, for what is typed into a program: `2048`, `0.000122070312`. */
export function typed(value: number): string {
  return String(Number(value.toPrecision(9)));
}

/** A number of which only the size matters, to two digits: `84`, `7.9e8`. */
export function rough(value: number): string {
  if (!(Math.abs(value) >= 1e4) || !Number.isFinite(value)) return significant(value, 2);
  const [mantissa, exponent] = value.toExponential(1).split('e');
  return `${Number(mantissa)}e${Number(exponent)}`;
}

/** A value to a fixed number of digits after the point, never `-0`. */
export function fixed(value: number, digits: number): string {
  const text = value.toFixed(digits);
  return Number(text) === 0 ? (0).toFixed(digits) : text;
}

/** `1 sample`, `2 samples`. */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${grouped(count)} ${count === 1 ? one : many}`;
}

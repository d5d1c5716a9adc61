import type { NumberType } from './numberTypes';

/**
 * A number as source code (Rust, and C but for what {@link cLiteral} adds) and as text: integers as they are, floats
 * with a point or an exponent and as many digits as read back exactly (nine for 32 bits, the shortest for 64).
 */
export function literal(value: number, type: NumberType): string {
  if (!type.float) return String(value === 0 ? 0 : value);
  const text = type.bytes === 4 ? String(Number(value.toPrecision(9))) : String(value);
  return /[.e]/.test(text) ? text : `${text}.0`;
}

/** A constant of C. The lowest 32-bit integer is a difference: its digits alone would be of a longer or unsigned type. */
export function cLiteral(value: number, type: NumberType): string {
  if (!type.float && value === -2147483648) return '(-2147483647 - 1)';
  return `${literal(value, type)}${type.float && type.bytes === 4 ? 'f' : ''}`;
}

/** Items separated by commas on lines of up to `width` characters, each line indented; a comma after the last. */
export function listed(items: readonly string[], indent: string, width = 100): string {
  const lines: string[] = [];
  let current = '';
  for (const item of items) {
    if (current !== '' && current.length + item.length + 2 > width) {
      lines.push(current);
      current = '';
    }
    current += current === '' ? `${indent}${item},` : ` ${item},`;
  }
  return [...lines, current].join('\n');
}

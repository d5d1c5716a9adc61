import { shortQuote } from './path';

/** A value of the document in words, for "got X when expected Y". */
export function describe(value: unknown): string {
  if (typeof value === 'string') return `the text ${shortQuote(value)}`;
  if (typeof value === 'number')
    return Number.isFinite(value) ? String(value) : 'a number too large for float64';
  if (value === null || typeof value !== 'object') return String(value);
  return Array.isArray(value) ? 'a list' : 'an object';
}

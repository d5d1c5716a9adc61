import { documentVersion, type PairingDocument } from './pairingDocument';

/**
 * JSON that is the same for the same value, after RFC 8785: keys sorted by their UTF-16 units, numbers as short as
 * they read back exactly, -0 as 0, no spaces; keys that are undefined are left out.
 * @throws for what JSON cannot hold: numbers that are not finite, functions
 */
export function canonicalJson(value: unknown): string {
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new Error(`got ${value} when expected a finite number`);
    return String(value === 0 ? 0 : value);
  }
  if (value === null || typeof value === 'boolean' || typeof value === 'string') return JSON.stringify(value);
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (typeof value !== 'object') throw new Error(`got ${typeof value} when expected a value of JSON`);
  const entries = Object.entries(value).filter(([, item]) => item !== undefined);
  entries.sort(([a], [b]) => (a < b ? -1 : 1));
  return `{${entries.map(([key, item]) => `${JSON.stringify(key)}:${canonicalJson(item)}`).join(',')}}`;
}

/**
 * What a document says, as the text that its digest is taken of: indentation, the order of keys, unknown keys, and
 * defaults written out or left out make no difference.
 */
export function documentMeaning(document: PairingDocument): string {
  return canonicalJson({ pairing: documentVersion, ...document });
}

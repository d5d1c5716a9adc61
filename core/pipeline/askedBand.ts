import { type Finding, finding } from '../findings/finding';
import { type BandFilter, bandFilter } from '../pair/bandFilter';
import type { Pairing } from './pairing';

/** The band that the document weights the error to: null where it asks for none, a finding where it cannot be had. */
export function askedBand({
  document,
  sampleRate,
}: Pick<Pairing, 'document' | 'sampleRate'>): BandFilter | Finding | null {
  const { band } = document.prepare;
  if (band === null) return null;
  const found = bandFilter(band, sampleRate);
  if (!('code' in found)) return found;
  const { code, ...values } = found;
  return finding(code, { ...values, ...band }, { path: ['prepare', 'band'] });
}

/** The same where `checkPair` has found nothing against it. */
export function bandOf(pairing: Pairing): BandFilter | null {
  const band = askedBand(pairing);
  return band !== null && 'taps' in band ? band : null;
}

import { decibels as plainDecibels, powerDecibels } from '../core/figures/decibels';
import { fixed, grouped, noFigure, significant } from '../core/figures/numbers';
import { t } from './words';

/** Figures as the page shows them: a unit, and as many digits as they deserve. */

const minus = (text: string) => text.replace('-', '−');

/** `−23.4 dB`. */
export function decibels(value: number | null, digits = 1): string {
  return minus(plainDecibels(value, digits));
}

/** `−23.4 ± 0.3 dB`. */
export function decibelsWithError(value: number | null, error: number | null, digits = 1): string {
  if (value === null || error === null || !Number.isFinite(value)) return decibels(value, digits);
  return `${minus(fixed(value, digits))} ± ${fixed(error, digits)} dB`;
}

/** A regularisation in decibels; 0 has none. */
export function regularisationDb(value: number): string {
  return value > 0 ? decibels(powerDecibels(value)) : t('none');
}

/** A value with four digits, a true minus sign. */
export function plain(value: number | null, digits = 4): string {
  return minus(significant(value, digits));
}

/** A count. */
export function count(value: number): string {
  return minus(grouped(value));
}

/** `128 kMAC/s`. */
export function macsPerSecond(value: number): string {
  if (value >= 1e9) return `${significant(value / 1e9)} GMAC/s`;
  if (value >= 1e6) return `${significant(value / 1e6)} MMAC/s`;
  if (value >= 1e3) return `${significant(value / 1e3)} kMAC/s`;
  return `${significant(value)} MAC/s`;
}

/** `14.2 ± 2.1 ppm`. */
export function partsPerMillion(value: number | null, error: number | null): string {
  if (value === null) return noFigure;
  const digits = error !== null && error < 1 ? 2 : 1;
  const spread = error === null ? '' : ` ± ${fixed(error, digits)}`;
  return `${minus(fixed(value, digits))}${spread} ppm`;
}

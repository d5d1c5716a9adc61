import { fixed, noFigure } from './numbers';

/** 10 / ln 10: a relative error in decibels, to first order. */
export const decibelsOfE = 4.342944819032518;

/** A figure in decibels as files hold it: rounded to two digits after the point; null where it is not finite. */
export function roundedDecibels(value: number | null | undefined): number | null {
  return value === null || value === undefined || !Number.isFinite(value) ? null : Number(fixed(value, 2));
}

/** A figure in decibels with its unit; two digits after the point in files, one in running messages. */
export function decibels(value: number | null, digits = 2): string {
  if (value === null || Number.isNaN(value)) return noFigure;
  if (!Number.isFinite(value)) return value > 0 ? '∞ dB' : '-∞ dB';
  return `${fixed(value, digits)} dB`;
}

/** `10 log10(ratio)`: of powers. Zero gives minus infinity. */
export function powerDecibels(ratio: number): number {
  return 10 * Math.log10(ratio);
}

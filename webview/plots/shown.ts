import { fixed, grouped, noFigure, significant } from '../../core/figures/numbers';

/** With a true minus sign, as everywhere on the page; an exponent's too. */
export function minus(text: string): string {
  return text.replaceAll('-', '−');
}

/** To `digits` significant digits. */
export function plain(value: number, digits = 4): string {
  return minus(significant(value, digits));
}

/** A value of an axis for the reader, with as many digits as its unit deserves: dB and degrees to 0.1. */
export function shown(value: number, unit: string): string {
  if (!Number.isFinite(value)) return Number.isNaN(value) ? noFigure : plain(value);
  if (/^dB/.test(unit) || unit === '°') return minus(fixed(value, 1));
  return plain(value);
}

/** The same with its unit, and before that what belongs to the number, as an error. */
export function withUnit(value: number, unit: string, error = ''): string {
  const text = shown(value, unit);
  if (unit === '' || text === noFigure) return `${text}${error}`;
  return `${text}${error}${unit === '°' ? '' : ' '}${unit}`;
}

/** `Length (taps)`; without a unit the label alone. */
export function axisTitle(axis: { label: string; unit: string }): string {
  return axis.unit === '' ? axis.label : `${axis.label} (${axis.unit})`;
}

/** A place in a recording: seconds to the digits that a step of `resolution` samples needs, or samples where no rate is known. */
export function placeInTime(sample: number, sampleRate: number | null, resolution: number): string {
  if (sampleRate === null) return grouped(Math.round(sample));
  const digits = Math.ceil(-Math.log10(Math.max(resolution, 1) / sampleRate));
  return grouped(fixed(sample / sampleRate, Math.min(6, Math.max(0, digits))));
}

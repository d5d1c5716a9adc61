import { frequency } from '../../figures/units';

/** A band of frequencies, in Hz. */
export interface Band {
  from: number;
  to: number;
}

/**
 * Runs of bins for which something holds, as bands that reach half a bin beyond them.
 * @param holds one entry a bin
 * @param frequencies of the bins, evenly spaced from 0 Hz
 * @param least narrowest band, in bins; runs parted by no more than two bins are taken for one
 */
export function bandsWhere(
  holds: ArrayLike<boolean | number>,
  frequencies: Float64Array,
  least: number,
): Band[] {
  const bands: Band[] = [];
  const half = 0.5 * frequencies[1];
  const last = frequencies.length - 1;
  let start: number | null = null;
  let end = 0;
  for (let f = 0; f <= last + 3; f++) {
    if (f <= last && holds[f]) {
      start ??= f;
      end = f;
    } else if (start !== null && f > end + 2) {
      if (end - start + 1 >= least) {
        bands.push({
          from: Math.max(0, frequencies[start] - half),
          to: Math.min(frequencies[last], frequencies[end] + half),
        });
      }
      start = null;
    }
  }
  return bands;
}

/** Means over `width` bins around each, fewer at the ends. */
export function smooth(row: Float64Array, width: number): Float64Array {
  const before = Math.floor((width - 1) / 2);
  return row.map((_, f) => {
    const part = row.subarray(Math.max(0, f - before), f - before + width);
    return part.reduce((sum, value) => sum + value, 0) / part.length;
  });
}

/** True where a frequency lies in one of the bands. */
export function inBands(bands: readonly Band[], hertz: number): boolean {
  return bands.some(({ from, to }) => hertz >= from && hertz <= to);
}

const named = 3;

/** `480 Hz to 520 Hz, 1.6 kHz to 4 kHz and 2 more`: the widest, in rising order. */
export function bandsInWords(bands: readonly Band[]): string {
  const widest = [...bands].sort((a, b) => b.to - b.from - (a.to - a.from)).slice(0, named);
  const words = widest
    .sort((a, b) => a.from - b.from)
    .map(({ from, to }) => `${frequency(rounded(from))} to ${frequency(rounded(to))}`);
  const more = bands.length > named ? ` and ${bands.length - named} more` : '';
  return words.join(', ') + more;
}

/** To three significant digits, which is more than the width of a bin is worth. */
function rounded(hertz: number): number {
  return Number(hertz.toPrecision(3));
}

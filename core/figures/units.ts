import { counted, grouped, significant } from './numbers';

/** A frequency with its unit: `62.5 Hz`, `1.25 kHz`, `2 MHz`. */
export function frequency(hertz: number): string {
  const size = Math.abs(hertz);
  if (size >= 1e6) return `${significant(hertz / 1e6, 6)} MHz`;
  if (size >= 1e3) return `${significant(hertz / 1e3, 6)} kHz`;
  return `${significant(hertz, 5)} Hz`;
}

/** A stretch of time with its unit: `2.5 ms`, `40 s`. */
export function duration(seconds: number): string {
  const size = Math.abs(seconds);
  return size > 0 && size < 1 ? `${significant(seconds * 1e3)} ms` : `${significant(seconds, 6)} s`;
}

/** A number of samples and how long they last: `5 samples (2.5 ms)`. */
export function samplesAndTime(samples: number, sampleRate: number): string {
  return `${counted(samples, 'sample')} (${duration(samples / sampleRate)})`;
}

/** Memory: `256 bytes`, `12 KiB`. */
export function memory(bytes: number): string {
  return bytes < 10240 ? counted(bytes, 'byte') : `${significant(bytes / 1024, 4)} KiB`;
}

/** Intervals in seconds and samples: `0 s to 40 s (samples 0 to 80,000)`, joined by `; `. */
export function intervals(list: readonly { from: number; to: number }[], sampleRate: number): string {
  if (list.length === 0) return 'none';
  return list
    .map(({ from, to }) => {
      const seconds = `${significant(from / sampleRate, 6)} s to ${significant(to / sampleRate, 6)} s`;
      return `${seconds} (samples ${grouped(from)} to ${grouped(to)})`;
    })
    .join('; ');
}

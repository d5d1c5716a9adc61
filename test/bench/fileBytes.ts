/** A column of a text recording: its heading, and what each row holds. */
export interface Column {
  /** One line of heading each, for example name and unit. */
  heading: string[];
  cells: string[];
}

/** Columns of equal length as delimited text in UTF-8. */
export function textBytes(columns: Column[], separator: string, lineEnd: string): Uint8Array {
  const headings = columns[0].heading.map((_, line) => columns.map(({ heading }) => heading[line]));
  const rows = columns[0].cells.map((_, n) => columns.map(({ cells }) => cells[n]));
  const text = [...headings, ...rows].map((row) => row.join(separator) + lineEnd).join('');
  return new TextEncoder().encode(text);
}

/** Whole counts as text, with the point that many digits from the right written as a comma. */
export function decimalComma(counts: number, digits: number): string {
  const text = String(Math.abs(counts)).padStart(digits + 1, '0');
  return `${counts < 0 ? '-' : ''}${text.slice(0, -digits)},${text.slice(-digits)}`;
}

/** Channels of 16-bit counts as a WAV file (RIFF, PCM; Microsoft & IBM, Multimedia Programming Interface 1.0). */
export function wavBytes(channels: Float64Array[], sampleRate: number): Uint8Array {
  const frame = 2 * channels.length;
  const size = frame * channels[0].length;
  const bytes = new Uint8Array(44 + size);
  const view = new DataView(bytes.buffer);
  const mark = (at: number, name: string) => bytes.set(new TextEncoder().encode(name), at);
  mark(0, 'RIFF');
  view.setUint32(4, 36 + size, true);
  mark(8, 'WAVEfmt ');
  view.setUint32(16, 16, true);
  view.setUint16(20, 1, true);
  view.setUint16(22, channels.length, true);
  view.setUint32(24, sampleRate, true);
  view.setUint32(28, sampleRate * frame, true);
  view.setUint16(32, frame, true);
  view.setUint16(34, 16, true);
  mark(36, 'data');
  view.setUint32(40, size, true);
  channels.forEach((counts, c) => {
    for (let n = 0; n < counts.length; n++) view.setInt16(44 + n * frame + 2 * c, counts[n], true);
  });
  return bytes;
}

/** The nearest whole counts, halves upward. */
export function toCounts(signal: Float64Array, perCount: number): Float64Array {
  return signal.map((value) => Math.floor(value / perCount + 0.5));
}

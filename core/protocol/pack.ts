/**
 * A value with all its series in one buffer: messages to a page are JSON, which turns NaN into null and ships the whole
 * buffer behind every subarray.
 */
export interface Packed {
  /** The value as JSON; each Float64Array in it stands as `{"series":[offset,length]}`. */
  json: string;
  series: ArrayBuffer;
}

const mark = 'series';

/**
 * Packs a value of plain objects, lists, texts, finite numbers, booleans, null and Float64Arrays.
 * The same value gives the same JSON, so that texts can be compared.
 */
export function pack(value: unknown): Packed {
  const parts: Float64Array[] = [];
  let length = 0;
  const json = JSON.stringify(value, (_key, part) => {
    if (!(part instanceof Float64Array)) return part;
    parts.push(part);
    const offset = length;
    length += part.length;
    return { [mark]: [offset, part.length] };
  });
  const series = new Float64Array(length);
  let offset = 0;
  for (const part of parts) {
    series.set(part, offset);
    offset += part.length;
  }
  return { json, series: series.buffer };
}

/** The value again; its series share one buffer, those of length 0 included. */
export function unpack<T>({ json, series }: Packed): T {
  return JSON.parse(json, (_key, part) => {
    if (typeof part !== 'object' || part === null || !Array.isArray(part[mark])) return part;
    const keys = Object.keys(part);
    if (keys.length !== 1) return part;
    const [offset, length] = part[mark];
    return typeof offset === 'number' ? new Float64Array(series, 8 * offset, length) : part;
  });
}

/** Whether both stand for the same value, NaN being the same as NaN. */
export function samePacked(a: Packed, b: Packed): boolean {
  if (a.json !== b.json || a.series.byteLength !== b.series.byteLength) return false;
  const [left, right] = [new Uint32Array(a.series), new Uint32Array(b.series)];
  return left.every((word, i) => word === right[i]);
}

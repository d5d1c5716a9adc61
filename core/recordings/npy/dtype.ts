import type { Decoder } from '../decoder';
import { viewOf } from '../viewOf';

/** A type of array elements that is read. */
export interface Dtype {
  /** For example `float64`. */
  name: string;
  bytes: number;
  decode: Decoder;
}

type Getter = (view: DataView, at: number, little: boolean) => number;

const kinds: Record<string, [name: string, get: Getter]> = {
  f4: ['float32', (view, at, little) => view.getFloat32(at, little)],
  f8: ['float64', (view, at, little) => view.getFloat64(at, little)],
  i1: ['int8', (view, at) => view.getInt8(at)],
  i2: ['int16', (view, at, little) => view.getInt16(at, little)],
  i4: ['int32', (view, at, little) => view.getInt32(at, little)],
  u1: ['uint8', (view, at) => view.getUint8(at)],
  u2: ['uint16', (view, at, little) => view.getUint16(at, little)],
  u4: ['uint32', (view, at, little) => view.getUint32(at, little)],
};

/**
 * The type of a NumPy `descr` such as `<f8`; null for those that are not read.
 * `=` stands for the machine that wrote the file, which the file does not name; it is taken for little-endian.
 */
export function dtypeOf(descr: string): Dtype | null {
  const match = /^([<>=|])([a-z]\d)$/.exec(descr);
  const kind = match === null || !Object.hasOwn(kinds, match[2]) ? undefined : kinds[match[2]];
  if (match === null || kind === undefined) return null;
  const [name, get] = kind;
  const little = match[1] !== '>';
  return {
    name,
    bytes: Number(match[2][1]),
    decode: (bytes, frameBytes, offset, into, at) => {
      const view = viewOf(bytes);
      for (let i = offset, n = at; i < bytes.length; i += frameBytes, n++) into[n] = get(view, i, little);
    },
  };
}

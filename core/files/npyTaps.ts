import type { DesignResult } from '../pipeline/designResult';
import { type Mark, markLine } from './generatedMark';
import { type NumberType, numberType } from './numberTypes';
import { orderedRow } from './orderedRow';

/**
 * Bytes of `SYMBOL_taps.npy` (NPY format 1.0, NumPy enhancement proposal 1): shape (inputs, taps), row-major,
 * little-endian, in the order asked for. The header is a Python literal, and the generated mark stands in it as a comment.
 */
export function npyTaps(result: DesignResult, mark: Mark): Uint8Array {
  const { document, arithmetic } = result;
  const type = numberType(document.arithmetic.word);
  const rows = arithmetic.values.map((row) => orderedRow(row, document.write.order));
  const head = header(type.npy, rows.length, document.filter.length, markLine(mark, 'hash'));
  const bytes = new Uint8Array(head.length + rows.length * document.filter.length * type.bytes);
  bytes.set(head);
  const view = new DataView(bytes.buffer, head.length);
  let at = 0;
  for (const row of rows) {
    for (const value of row) {
      put(view, at, value, type);
      at += type.bytes;
    }
  }
  return bytes;
}

function header(descr: string, inputs: number, taps: number, comment: string): Uint8Array {
  const literal = `{'descr': '${descr}', 'fortran_order': False, 'shape': (${inputs}, ${taps}), } ${comment}`;
  // Ten bytes before the literal; the data begins at a multiple of 64.
  const padded = `${literal.padEnd(Math.ceil((literal.length + 11) / 64) * 64 - 11)}\n`;
  const magic = [
    0x93,
    0x4e,
    0x55,
    0x4d,
    0x50,
    0x59,
    1,
    0,
    padded.length % 256,
    Math.floor(padded.length / 256),
  ];
  return Uint8Array.from([...magic, ...new TextEncoder().encode(padded)]);
}

function put(view: DataView, at: number, value: number, type: NumberType): void {
  if (type.float && type.bytes === 4) view.setFloat32(at, value, true);
  else if (type.float) view.setFloat64(at, value, true);
  else if (type.bytes === 1) view.setInt8(at, value);
  else if (type.bytes === 2) view.setInt16(at, value, true);
  else view.setInt32(at, value, true);
}

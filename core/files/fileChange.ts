import { readMark } from './generatedMark';

/** What writing would make of a file that is there; `foreign`: it does not carry our mark. */
export type FileChange = 'unchanged' | 'changed' | 'foreign';

/** As much of a file as holds its first line. */
export const markBytes = 4096;

/**
 * @param existing bytes of the file that is there: all of them, or where it is longer than `bytes` more than those have
 *   and {@link markBytes} at least
 * @param bytes as they would be written
 */
export function fileChange(existing: Uint8Array, bytes: Uint8Array): FileChange {
  if (existing.length === bytes.length && existing.every((byte, i) => byte === bytes[i])) return 'unchanged';
  // The first bytes as characters of the same number: an NPY file is no UTF-8.
  const start = Array.from(existing.subarray(0, markBytes), (byte) => String.fromCharCode(byte)).join('');
  return readMark(start) === null ? 'foreign' : 'changed';
}

import type { ByteSource } from '../../bytes/byteSource';
import { type Finding, finding } from '../../findings/finding';
import { parseLiteral } from './literal';

/** What the header of an NPY file says. */
export interface NpyHeader {
  /** As written, for example `<f8`. */
  dtype: string;
  fortran: boolean;
  /** One or two axes. */
  shape: number[];
  /** Where the samples start. */
  dataFrom: number;
}

/** Longer headers describe structures that are no recordings. */
const longestHeader = 65536;

/** Reads the header (NumPy Enhancement Proposal 1, versions 1 to 3); a finding where it is none that is read. */
export async function readHeader(source: ByteSource, file: string): Promise<NpyHeader | Finding> {
  const bad = (what: string, expected: string) => finding('unreadable-header', { what, expected }, { file });
  const start = (await source.read(0, Math.min(12, source.size))).slice();
  if (start.length < 12) return bad(`a file of ${start.length} bytes`, 'a whole NPY header');
  const version = start[6];
  if (version < 1 || version > 3) return bad(`NPY version ${version}`, '1, 2 or 3');
  const from = version === 1 ? 10 : 12;
  const length = start[8] + 256 * start[9] + (version === 1 ? 0 : 65536 * start[10] + 16777216 * start[11]);
  if (length > longestHeader) return bad(`a header of ${length} bytes`, `at most ${longestHeader}`);
  if (from + length > source.size)
    return bad(`a header of ${length} bytes in a file of ${source.size}`, 'a whole file');
  const text = new TextDecoder(version === 3 ? 'utf-8' : 'latin1').decode(await source.read(from, length));
  const value = parseLiteral(text);
  if (value === null || typeof value !== 'object' || Array.isArray(value)) {
    return bad('a header that is no Python dictionary', "{'descr': …, 'fortran_order': …, 'shape': …}");
  }
  const { descr, fortran_order: fortran, shape } = value;
  if (typeof descr !== 'string') {
    return finding(
      'unsupported-dtype',
      { what: descr === undefined ? 'no "descr"' : 'structured elements' },
      { file },
    );
  }
  if (typeof fortran !== 'boolean') return bad('no "fortran_order"', 'True or False');
  if (
    !Array.isArray(shape) ||
    !shape.every((axis) => typeof axis === 'number' && Number.isInteger(axis) && axis >= 0)
  ) {
    return bad('no "shape"', 'a tuple of whole numbers');
  }
  if (shape.length < 1 || shape.length > 2) {
    return finding('unsupported-dtype', { what: `an array of ${shape.length} dimensions` }, { file });
  }
  return { dtype: descr, fortran, shape: shape as number[], dataFrom: from + length };
}

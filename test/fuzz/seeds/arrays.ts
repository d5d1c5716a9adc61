import { normals } from '../../support/random';
import { joined, little } from '../../support/wavBytes';
import type { Seed } from './seed';

/**
 * An NPY file by hand (NumPy Enhancement Proposal 1): magic, version, length of the header, header, samples.
 * @param declared length of the header as the file gives it
 */
export function npyOf(header: string, samples: Uint8Array, version = 1, declared?: number): Uint8Array {
  const width = version === 1 ? 2 : 4;
  const bytes = new TextEncoder().encode(header);
  const length = little(width, declared ?? bytes.length);
  return joined('\x93NUMPY', Uint8Array.of(version, 0), length, bytes, samples);
}

/** The header as NumPy writes it, padded to 64 bytes. */
export function npyHeader(descr: string, fortran: string, shape: string): string {
  const bare = `{'descr': ${descr}, 'fortran_order': ${fortran}, 'shape': ${shape}, }`;
  return `${bare.padEnd(64 * Math.ceil((bare.length + 11) / 64) - 11, ' ')}\n`;
}

/** Arrays of every kind of layout and some element types. */
export function arraySeeds(): Seed[] {
  const doubles = new Uint8Array(Float64Array.from(normals(11, 240)).buffer);
  const singles = new Uint8Array(Float32Array.from(normals(12, 400)).buffer);
  const words = new Uint8Array(Int16Array.from(normals(13, 900), (value) => 3000 * value).buffer);
  const seed = (descr: string, fortran: string, shape: string, samples: Uint8Array, version = 1): Seed => ({
    name: `${descr} ${shape}, version ${version}`,
    bytes: npyOf(npyHeader(`'${descr}'`, fortran, shape), samples, version),
  });
  return [
    seed('<f8', 'False', '(240,)', doubles),
    seed('<f8', 'False', '(80, 3)', doubles),
    seed('<f4', 'True', '(200, 2)', singles, 2),
    seed('>f4', 'False', '(2, 200)', singles, 3),
    seed('<i2', 'True', '(3, 300)', words),
    seed('|u1', 'False', '(30, 30)', words),
    seed('=i4', 'False', '(450, 1)', words),
  ];
}

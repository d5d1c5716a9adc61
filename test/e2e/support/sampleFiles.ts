import { joined, little, wavOf } from '../../support/wavBytes';

/** A mono WAV file of 32-bit floats. */
export function monoWav(samples: Float64Array, sampleRate: number): Uint8Array {
  const floats = Float32Array.from(samples);
  return wavOf({ tag: 3, channels: 1, sampleRate, bits: 32 }, new Uint8Array(floats.buffer));
}

/** An NPY file of one dimension, in doubles. */
export function npyOf(samples: Float64Array): Uint8Array {
  const head = `{'descr': '<f8', 'fortran_order': False, 'shape': (${samples.length},), }`;
  // The samples start at a multiple of 64.
  const padded = `${head.padEnd(64 * Math.ceil((head.length + 11) / 64) - 11)}\n`;
  return joined('\x93NUMPY\x01\x00', little(2, padded.length), padded, new Uint8Array(samples.buffer));
}

import type { Decoder } from '../decoder';
import { viewOf } from '../viewOf';
import type { Codec } from './format';
import { aLawValues, muLawValues } from './g711';

/** Whether the machine's words are in the order of the file. */
const littleEndian = new Uint8Array(Uint16Array.of(1).buffer)[0] === 1;

/** PCM, A-law and µ-law samples become -1..1, floats keep their value. */
export const decoders: Record<Codec, Decoder> = {
  pcm8: (bytes, frameBytes, offset, into, at) => {
    for (let i = offset, n = at; i < bytes.length; i += frameBytes, n++) into[n] = (bytes[i] - 128) / 128;
  },
  pcm16: (bytes, frameBytes, offset, into, at) => {
    if (littleEndian && (bytes.byteOffset + offset) % 2 === 0 && frameBytes % 2 === 0) {
      const words = new Int16Array(bytes.buffer, bytes.byteOffset + offset, (bytes.length - offset) >> 1);
      const step = frameBytes >> 1;
      for (let i = 0, n = at; i < words.length; i += step, n++) into[n] = words[i] * (1 / 32768);
      return;
    }
    for (let i = offset, n = at; i < bytes.length; i += frameBytes, n++) {
      into[n] = (((bytes[i] | (bytes[i + 1] << 8)) << 16) >> 16) / 32768;
    }
  },
  pcm24: (bytes, frameBytes, offset, into, at) => {
    for (let i = offset, n = at; i < bytes.length; i += frameBytes, n++) {
      into[n] = (((bytes[i] << 8) | (bytes[i + 1] << 16) | (bytes[i + 2] << 24)) >> 8) / 8388608;
    }
  },
  pcm32: (bytes, frameBytes, offset, into, at) => {
    for (let i = offset, n = at; i < bytes.length; i += frameBytes, n++) {
      into[n] = (bytes[i] | (bytes[i + 1] << 8) | (bytes[i + 2] << 16) | (bytes[i + 3] << 24)) / 2147483648;
    }
  },
  float32: (bytes, frameBytes, offset, into, at) => {
    const view = viewOf(bytes);
    for (let i = offset, n = at; i < bytes.length; i += frameBytes, n++) into[n] = view.getFloat32(i, true);
  },
  float64: (bytes, frameBytes, offset, into, at) => {
    const view = viewOf(bytes);
    for (let i = offset, n = at; i < bytes.length; i += frameBytes, n++) into[n] = view.getFloat64(i, true);
  },
  'a-law': byTable(aLawValues()),
  'mu-law': byTable(muLawValues()),
};

function byTable(values: Float64Array): Decoder {
  const scaled = values.map((value) => value / 32768);
  return (bytes, frameBytes, offset, into, at) => {
    for (let i = offset, n = at; i < bytes.length; i += frameBytes, n++) into[n] = scaled[bytes[i]];
  };
}

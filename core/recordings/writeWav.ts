const floatFormat = 3;
const largest32 = 0xffffffff;

/**
 * Header of a 32-bit float WAV file whose samples follow it: RIFF with a `fact` chunk, or RF64 (EBU Tech 3306) where the
 * samples need more than 4 GiB.
 * @param sampleRate in Hz; a WAV header holds whole numbers from 1, so that it is rounded
 */
export function floatWavHeader(sampleRate: number, channels: number, samples: number): Uint8Array {
  const dataBytes = 4 * channels * samples;
  const wide = dataBytes + 76 > largest32;
  const writer = newWriter(wide ? 94 : 58);
  const rate = Math.max(1, Math.round(sampleRate));
  const riffBytes = writer.size - 8 + dataBytes;
  writer
    .text(wide ? 'RF64' : 'RIFF')
    .u32(wide ? largest32 : riffBytes)
    .text('WAVE');
  if (wide) writer.text('ds64').u32(28).u64(riffBytes).u64(dataBytes).u64(samples).u32(0);
  writer.text('fmt ').u32(18).u16(floatFormat).u16(channels).u32(rate);
  writer
    .u32(rate * 4 * channels)
    .u16(4 * channels)
    .u16(32)
    // No extension; formats other than PCM say so.
    .u16(0);
  writer.text('fact').u32(4).u32(Math.min(samples, largest32));
  writer.text('data').u32(wide ? largest32 : dataBytes);
  return writer.bytes;
}

/** Interleaved 32-bit little-endian floats. */
export function floatWavSamples(channels: readonly Float64Array[]): Uint8Array {
  const samples = channels[0].length;
  const view = new DataView(new ArrayBuffer(4 * samples * channels.length));
  for (let n = 0, at = 0; n < samples; n++) {
    for (const channel of channels) {
      view.setFloat32(at, channel[n], true);
      at += 4;
    }
  }
  return new Uint8Array(view.buffer);
}

function newWriter(size: number) {
  const view = new DataView(new ArrayBuffer(size));
  let at = 0;
  const writer = {
    size,
    bytes: new Uint8Array(view.buffer),
    text(text: string) {
      for (const character of text) view.setUint8(at++, character.charCodeAt(0));
      return writer;
    },
    u16(value: number) {
      view.setUint16(at, value, true);
      at += 2;
      return writer;
    },
    u32(value: number) {
      view.setUint32(at, value, true);
      at += 4;
      return writer;
    },
    u64(value: number) {
      return writer.u32(value % 4294967296).u32(Math.floor(value / 4294967296));
    },
  };
  return writer;
}

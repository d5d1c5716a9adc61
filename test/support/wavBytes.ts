import type { ByteSource } from '../../core/bytes/byteSource';

// Byte strings of RIFF files (Microsoft & IBM 1991: Multimedia Programming Interface and Data Specifications 1.0).

/** What a `fmt ` chunk says. */
export interface FormatFields {
  /** 1 PCM, 3 float, 6 A-law, 7 µ-law. */
  tag: number;
  channels: number;
  sampleRate: number;
  /** Bits of the container of one sample. */
  bits: number;
  /** Bytes of a frame; those of whole containers where it is left out. */
  align?: number;
}

/** Whole numbers of `width` bytes each, lowest byte first, negative ones as two's complement. */
export function little(width: number, ...values: number[]): Uint8Array {
  const bytes = new Uint8Array(width * values.length);
  values.forEach((value, i) => {
    let rest = BigInt.asUintN(8 * width, BigInt(value));
    for (let at = 0; at < width; at++, rest >>= 8n) bytes[i * width + at] = Number(rest & 255n);
  });
  return bytes;
}

/** Pieces one after the other, texts as one byte a character. */
export function joined(...pieces: (Uint8Array | string)[]): Uint8Array {
  const parts = pieces.map((piece) => (typeof piece === 'string' ? Buffer.from(piece, 'latin1') : piece));
  return new Uint8Array(Buffer.concat(parts));
}

/** A chunk with its pad byte where the content is odd. */
export function chunk(id: string, content: Uint8Array, declared = content.length): Uint8Array {
  return joined(id, little(4, declared), content, content.length % 2 === 1 ? '\0' : '');
}

/** The 16 bytes that every format starts with. */
export function formatContent({ tag, channels, sampleRate, bits, align }: FormatFields): Uint8Array {
  const frame = align ?? channels * Math.ceil(bits / 8);
  return joined(little(2, tag, channels), little(4, sampleRate, sampleRate * frame), little(2, frame, bits));
}

/** Microsoft's extension of 24 bytes: the tag is the start of a GUID, some bits may mean nothing. */
export function extensibleContent(
  fields: FormatFields,
  validBits = fields.bits,
  guidTail = '\0\0\0\0\x10\0\x80\0\0\xaa\0\x38\x9b\x71',
): Uint8Array {
  const basics = formatContent({ ...fields, tag: 0xfffe });
  return joined(basics, little(2, 22, validBits), little(4, 0), little(2, fields.tag), guidTail);
}

/** A file of these chunks. RF64 and BW64 leave their 32-bit size open. */
export function fileOf(form: 'RIFF' | 'RF64' | 'BW64' | 'RIFX', ...chunks: Uint8Array[]): Uint8Array {
  const body = joined('WAVE', ...chunks);
  return joined(form, little(4, form.startsWith('RIF') ? body.length : 0xffffffff), body);
}

/** The usual file: a format, then the samples. */
export function wavOf(fields: FormatFields, samples: Uint8Array): Uint8Array {
  return fileOf('RIFF', chunk('fmt ', formatContent(fields)), chunk('data', samples));
}

/**
 * A source over bytes in memory that holds readers to the contract: it throws where they ask for what the file does not
 * have, and spoils each array at the next read.
 */
export function strictSource(bytes: Uint8Array): ByteSource {
  let lent = new Uint8Array(0);
  return {
    size: bytes.length,
    read: async (offset, length) => {
      if (!(offset >= 0 && length >= 0 && offset + length <= bytes.length)) {
        throw new Error(`read of ${length} bytes at ${offset} in a file of ${bytes.length}`);
      }
      lent.fill(0xee);
      lent = bytes.slice(offset, offset + length);
      return lent;
    },
  };
}

import type { ByteSource } from '../../bytes/byteSource';

/** A text as one byte a character, and its start as a string. */
export interface TextSource {
  /** UTF-8 without its mark, or UTF-16 with every code unit beyond Latin-1 as `?`. */
  bytes: ByteSource;
  /** The first 256 Ki characters or so. */
  head: string;
  /** The head is all of the text. */
  whole: boolean;
  utf16: boolean;
}

const headLength = 1 << 18;

/** Tells UTF-8, with and without a mark, from UTF-16 with a mark or with zeros in every other byte. */
export async function textSource(source: ByteSource): Promise<TextSource> {
  const start = (await source.read(0, Math.min(source.size, 64))).slice();
  const utf16 = utf16Order(start);
  if (utf16 === null) {
    const skip = start[0] === 0xef && start[1] === 0xbb && start[2] === 0xbf ? 3 : 0;
    const bytes = skip === 0 ? source : shifted(source, skip);
    const head = new TextDecoder().decode(await bytes.read(0, Math.min(bytes.size, headLength)));
    return { bytes, head, whole: bytes.size <= headLength, utf16: false };
  }
  const { skip, little } = utf16;
  const raw = await source.read(skip, Math.min(source.size - skip, 2 * headLength));
  const head = new TextDecoder(little ? 'utf-16le' : 'utf-16be').decode(raw);
  const bytes = narrowed(source, skip, little);
  return { bytes, head, whole: bytes.size <= headLength, utf16: true };
}

function utf16Order(start: Uint8Array): { skip: number; little: boolean } | null {
  if (start[0] === 0xff && start[1] === 0xfe) return { skip: 2, little: true };
  if (start[0] === 0xfe && start[1] === 0xff) return { skip: 2, little: false };
  if (start.length < 8 || start.length % 2 !== 0) return null;
  const zeros = [0, 0];
  start.forEach((byte, i) => {
    if (byte === 0) zeros[i % 2]++;
  });
  const half = start.length / 2;
  if (zeros[1] === half && zeros[0] === 0) return { skip: 0, little: true };
  return zeros[0] === half && zeros[1] === 0 ? { skip: 0, little: false } : null;
}

function shifted(source: ByteSource, skip: number): ByteSource {
  return { size: source.size - skip, read: (offset, length) => source.read(offset + skip, length) };
}

/** Numbers need no more than ASCII, so that a code unit becomes a byte and offsets stay simple. */
function narrowed(source: ByteSource, skip: number, little: boolean): ByteSource {
  const size = Math.floor((source.size - skip) / 2);
  const low = little ? 0 : 1;
  return {
    size,
    async read(offset, length) {
      const raw = await source.read(skip + 2 * offset, 2 * length);
      const narrow = new Uint8Array(raw.length >> 1);
      for (let i = 0; i < narrow.length; i++) {
        narrow[i] = raw[2 * i + 1 - low] === 0 ? raw[2 * i + low] : 63;
      }
      return narrow;
    },
  };
}

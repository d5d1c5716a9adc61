import type { ByteSource } from '../../bytes/byteSource';
import { type Finding, finding } from '../../findings/finding';
import { viewOf } from '../viewOf';
import type { Chunk } from './chunks';

/** How samples are stored. */
export type Codec = 'pcm8' | 'pcm16' | 'pcm24' | 'pcm32' | 'float32' | 'float64' | 'a-law' | 'mu-law';

export interface WavFormat {
  codec: Codec;
  channels: number;
  /** Hz. */
  sampleRate: number;
  /** Bytes of one sample of one channel. */
  sampleBytes: number;
  /** Bits that mean something in a PCM sample, where fewer than it is stored in. */
  validBits: number | null;
}

const mostChannels = 1024;
const extensible = 0xfffe;
/** What follows the format tag in the sub-format of an extensible header (Microsoft 2001). */
const subFormatTail = '000000001000800000aa00389b71';

/** Names of codecs that are met and not read. */
const codecNames: Record<number, string> = {
  2: 'Microsoft ADPCM',
  17: 'IMA ADPCM',
  49: 'GSM 6.10',
  64: 'G.721 ADPCM',
  80: 'MPEG layer 2',
  85: 'MPEG layer 3',
  353: 'Windows Media Audio',
  61868: 'FLAC',
};

/** Reads the `fmt ` chunk; a finding where it is none that is read. */
export async function readFormat(
  source: ByteSource,
  chunk: Chunk,
  file: string,
): Promise<WavFormat | Finding> {
  if (chunk.size < 16) {
    return finding(
      'unreadable-header',
      { what: `a "fmt " chunk of ${chunk.size} bytes`, expected: '16 at least' },
      { file },
    );
  }
  const view = viewOf(await source.read(chunk.from, Math.min(chunk.size, 40)));
  let tag = view.getUint16(0, true);
  const channels = view.getUint16(2, true);
  const sampleRate = view.getUint32(4, true);
  const align = view.getUint16(12, true);
  const bits = view.getUint16(14, true);
  let validBits: number | null = null;
  if (tag === extensible && view.byteLength >= 40) {
    const tail = Array.from({ length: 14 }, (_, i) =>
      view
        .getUint8(26 + i)
        .toString(16)
        .padStart(2, '0'),
    ).join('');
    if (tail === subFormatTail) {
      tag = view.getUint16(24, true);
      validBits = view.getUint16(18, true);
    }
  }
  if (channels < 1 || channels > mostChannels) {
    return finding(
      'unreadable-header',
      { what: `${channels} channels`, expected: `1 to ${mostChannels}` },
      { file },
    );
  }
  if (sampleRate < 1)
    return finding(
      'unreadable-header',
      { what: 'a sample rate of 0 Hz', expected: '1 Hz or more' },
      { file },
    );
  const sampleBytes = align / channels;
  const codec = codecOf(tag, bits, sampleBytes);
  if (codec === null) {
    const name = codecNames[tag];
    const what = `format 0x${tag.toString(16).padStart(4, '0')}${name === undefined ? '' : ` (${name})`} with ${bits} bits in ${align} bytes a frame of ${channels}`;
    return finding('unsupported-codec', { what }, { file });
  }
  const narrowed =
    codec.startsWith('pcm') && validBits !== null && validBits > 0 && validBits < 8 * sampleBytes;
  const narrow = codec.startsWith('pcm') && bits < 8 * sampleBytes ? bits : null;
  return { codec, channels, sampleRate, sampleBytes, validBits: narrowed ? validBits : narrow };
}

/** PCM of odd widths stands left-aligned in the next whole number of bytes. */
function codecOf(tag: number, bits: number, bytes: number): Codec | null {
  if (tag === 1 && bits > 8 * (bytes - 1) && bits <= 8 * bytes) {
    return ([null, 'pcm8', 'pcm16', 'pcm24', 'pcm32'] as const)[bytes] ?? null;
  }
  if (tag === 3 && bits === 32 && bytes === 4) return 'float32';
  if (tag === 3 && bits === 64 && bytes === 8) return 'float64';
  if (tag === 6 && bits === 8 && bytes === 1) return 'a-law';
  if (tag === 7 && bits === 8 && bytes === 1) return 'mu-law';
  return null;
}

const codecWords: Record<Codec, string> = {
  pcm8: 'PCM 8 bit',
  pcm16: 'PCM 16 bit',
  pcm24: 'PCM 24 bit',
  pcm32: 'PCM 32 bit',
  float32: 'float 32 bit',
  float64: 'float 64 bit',
  'a-law': 'A-law',
  'mu-law': 'µ-law',
};

/** `WAV, PCM 24 bit (20 valid)`. */
export function formatInWords({ codec, validBits }: WavFormat): string {
  return `WAV, ${codecWords[codec]}${validBits === null ? '' : ` (${validBits} valid)`}`;
}

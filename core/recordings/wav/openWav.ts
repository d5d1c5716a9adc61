import type { ByteSource } from '../../bytes/byteSource';
import { type Finding, finding } from '../../findings/finding';
import { framedReader } from '../framedReader';
import { openSafely } from '../openSafely';
import type { Opened } from '../recording';
import { type Chunk, findChunks } from './chunks';
import { decoders } from './decode';
import { formatInWords, readFormat, type WavFormat } from './format';

/**
 * Opens a RIFF/WAVE, RF64 or BW64 file: PCM of 8 to 32 bits, floats of 32 and 64 bits, A-law and µ-law, plain or extensible
 * header, any number of channels, files of any size. PCM, A-law and µ-law amplitudes are -1..1.
 */
export function openWav(source: ByteSource, file: string): Promise<Opened> {
  return openSafely(source, file, (whole) => open(whole, file));
}

async function open(source: ByteSource, file: string): Promise<Opened> {
  const start = String.fromCharCode(...(await source.read(0, Math.min(12, source.size))));
  if (start.startsWith('RIFX'))
    return refused(finding('unsupported-codec', { what: 'RIFX, whose numbers are big-endian' }, { file }));
  if (!start.endsWith('WAVE') || start.length < 12) {
    return refused(
      finding(
        'unreadable-header',
        { what: `"${printable(start.slice(8))}" after the size`, expected: '"WAVE"' },
        { file },
      ),
    );
  }
  const { format: formatChunk, data, findings } = await findChunks(source, file);
  if (formatChunk === null || data === null) {
    const what = formatChunk === null ? 'no "fmt " chunk' : 'no "data" chunk';
    return refused(
      finding('unreadable-header', { what, expected: 'one before the file ends' }, { file }),
      findings,
    );
  }
  const format = await readFormat(source, formatChunk, file);
  if ('code' in format) return refused(format, findings);
  return { recording: recordingOf(source, file, format, data, findings), findings };
}

function recordingOf(
  source: ByteSource,
  file: string,
  format: WavFormat,
  data: Chunk,
  findings: Finding[],
): Opened['recording'] {
  const frameBytes = format.sampleBytes * format.channels;
  const samples = Math.floor(data.size / frameBytes);
  if (data.size % frameBytes !== 0) {
    findings.push(finding('partial-frame', { bytes: data.size % frameBytes, frame: frameBytes }, { file }));
  }
  if (samples < 2) {
    findings.push(finding('too-short', { samples }, { file }));
    return null;
  }
  return {
    file,
    format: formatInWords(format),
    pcm: !format.codec.startsWith('float'),
    ...(format.codec.startsWith('pcm') ? { bits: format.validBits ?? 8 * format.sampleBytes } : {}),
    lineEndsIgnored: false,
    sampleRate: format.sampleRate,
    samples,
    channels: new Array(format.channels).fill(null),
    read: framedReader(source, file, data.from, frameBytes, format.sampleBytes, decoders[format.codec]),
  };
}

function refused(found: Finding, earlier: readonly Finding[] = []): Opened {
  return { recording: null, findings: [found, ...earlier] };
}

function printable(text: string): string {
  return text.replace(/[^ -~]/g, '.');
}

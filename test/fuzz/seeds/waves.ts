import { floatWavHeader, floatWavSamples } from '../../../core/recordings/writeWav';
import { normals, seededUniform } from '../../support/random';
import {
  chunk,
  extensibleContent,
  type FormatFields,
  fileOf,
  formatContent,
  joined,
  little,
  wavOf,
} from '../../support/wavBytes';
import { benchFile } from './benchFiles';
import type { Seed } from './seed';

/** WAV files of every codec and form that is read, the sample bench's own among them, cut to some kilobytes. */
export function waveSeeds(): Seed[] {
  const pcm16: FormatFields = { tag: 1, channels: 2, sampleRate: 48000, bits: 16 };
  const plain = [pcm16, { ...pcm16, bits: 8 }, { ...pcm16, bits: 24, channels: 3 }, { ...pcm16, bits: 32 }];
  const coded = [
    { tag: 6, channels: 1, sampleRate: 8000, bits: 8 },
    { tag: 7, channels: 2, sampleRate: 8000, bits: 8 },
    { tag: 1, channels: 1, sampleRate: 44100, bits: 12, align: 2 },
  ];
  const floats = [normals(1, 300), normals(2, 300).map((value) => 0.01 * value)];
  const wide = { tag: 3, channels: 2, sampleRate: 96000, bits: 64 };
  return [
    { name: 'tubing.wav', bytes: benchFile('tubing.wav', 8192) },
    ...[...plain, ...coded].map((format) => ({
      name: `format ${format.tag}, ${format.bits} bits`,
      bytes: wavOf(format, noise(format.bits, 1800)),
    })),
    { name: 'float32', bytes: joined(floatWavHeader(2000, 2, 300), floatWavSamples(floats)) },
    { name: 'float64', bytes: wavOf(wide, new Uint8Array(Float64Array.from(normals(3, 400)).buffer)) },
    { name: 'extensible', bytes: extensible({ ...pcm16, bits: 32 }) },
    { name: 'RF64', bytes: wideFile('RF64', pcm16) },
    { name: 'BW64', bytes: wideFile('BW64', pcm16) },
    { name: 'many chunks', bytes: manyChunks(pcm16) },
  ];
}

function noise(seed: number, bytes: number): Uint8Array {
  const uniform = seededUniform(seed);
  return Uint8Array.from({ length: bytes }, () => 256 * uniform());
}

function extensible(format: FormatFields): Uint8Array {
  return fileOf('RIFF', chunk('fmt ', extensibleContent(format, 20)), chunk('data', noise(5, 1600)));
}

function wideFile(form: 'RF64' | 'BW64', format: FormatFields): Uint8Array {
  const samples = noise(6, 1200);
  const sizes = joined(little(8, 1300, samples.length, samples.length / 4), little(4, 0));
  const data = chunk('data', samples, 0xffffffff);
  return fileOf(form, chunk('ds64', sizes), chunk('fmt ', formatContent(format)), data);
}

function manyChunks(format: FormatFields): Uint8Array {
  const odd = chunk('LIST', noise(7, 27));
  const small = Array.from({ length: 40 }, (_, i) => chunk('junk', noise(i, i % 5)));
  return fileOf(
    'RIFF',
    odd,
    ...small,
    chunk('fmt ', formatContent(format)),
    chunk('data', noise(8, 900)),
    odd,
  );
}

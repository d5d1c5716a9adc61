import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { openWav } from '../../../../core/recordings/wav/openWav';
import { needs, python } from '../../../support/programs';
import { normals } from '../../../support/random';
import { strictSource } from '../../../support/wavBytes';

// Files that sox and ffmpeg write, against the samples that another program finds in them. All keep PCM, A-law and
// µ-law exactly when they turn them into doubles; sox has 32-bit integers inside, so floats are SciPy's and ffmpeg's.

const folder = mkdtempSync(join(tmpdir(), 'wav-'));
afterAll(() => rmSync(folder, { recursive: true }));
const file = join(folder, 'test.wav');
const run = (command: string, args: string[], input: Uint8Array = new Uint8Array(0)) =>
  execFileSync(command, args, { maxBuffer: 1 << 26, stdio: ['pipe', 'pipe', 'ignore'], input });
const frames = 3000;

/** Noise of which a few samples reach full scale, as raw doubles. */
function raw(channels: number): Uint8Array {
  const noise = normals(channels, frames * channels).map((v, i) => (i < 40 ? (i % 3) - 1 : 0.2 * v));
  return new Uint8Array(noise.map((v) => Math.min(1, Math.max(-1, v))).buffer);
}

/** Bytes of the file that sox writes, or of what it writes to a pipe. */
function bySox(channels: number, args: readonly string[], to = file): Uint8Array {
  const input = ['-D', '-t', 'f64', '-L', '-r', '44100', '-c', `${channels}`, '-'];
  const piped = run('sox', [...input, '-e', ...args, '-t', 'wav', to], raw(channels));
  return new Uint8Array(to === '-' ? piped : readFileSync(to));
}

function byFfmpeg(channels: number, args: readonly string[], to = file): Uint8Array {
  const input = ['-y', '-f', 'f64le', '-ar', '44100', '-ac', `${channels}`, '-i', '-'];
  const piped = run('ffmpeg', [...input, '-c:a', ...args, '-f', 'wav', to], raw(channels));
  return new Uint8Array(to === '-' ? piped : readFileSync(to));
}

const scipyReader = `
import sys, numpy
from scipy.io import wavfile
data = wavfile.read(sys.argv[1])[1]
scale = {'uint8': 128, 'int16': 2**15, 'int32': 2**31}.get(str(data.dtype), 1)
data = (data.astype('<f8') - (128 if data.dtype == numpy.uint8 else 0)) / scale
sys.stdout.buffer.write(data.tobytes())`;

/** How others read the file. */
const decoders = {
  sox: () => run('sox', ['-D', file, '-t', 'f64', '-L', '-']),
  ffmpeg: () => run('ffmpeg', ['-i', file, '-f', 'f64le', '-']),
  SciPy: () => run(python, ['-W', 'ignore', '-c', scipyReader, file]),
};

/** What we read: all samples, channels in turn. */
async function ours(bytes: Uint8Array) {
  const { recording, findings } = await openWav(strictSource(bytes), 'test.wav');
  if (recording === null) return { samples: null, findings };
  const { samples: length, channels, format, sampleRate } = recording;
  const planes = await recording.read([...channels.keys()], 0, length);
  const samples = new Float64Array(length * planes.length);
  planes.forEach((plane, c) => {
    for (let n = 0; n < length; n++) samples[n * planes.length + c] = plane[n];
  });
  return { samples, channels: planes.length, format, sampleRate, findings };
}

async function expectSame(
  bytes: Uint8Array,
  channels: number,
  format: string,
  decoder: keyof typeof decoders,
) {
  const samples = new Float64Array(new Uint8Array(decoders[decoder]()).buffer);
  expect(samples.length).toBe(frames * channels);
  const wanted = { samples, channels, format: `WAV, ${format}`, sampleRate: 44100, findings: [] };
  expect(await ours(bytes)).toEqual(wanted);
}

const programs = needs('sox') && needs('ffmpeg') && needs('scipy');

/** What the reader calls a codec, sox's words and ffmpeg's. */
const codecs = [
  ['PCM 8 bit', ['unsigned-integer', '-b', '8'], 'pcm_u8'],
  ['PCM 16 bit', ['signed-integer', '-b', '16'], 'pcm_s16le'],
  ['PCM 24 bit', ['signed-integer', '-b', '24'], 'pcm_s24le'],
  ['PCM 32 bit', ['signed-integer', '-b', '32'], 'pcm_s32le'],
  ['float 32 bit', ['floating-point', '-b', '32'], 'pcm_f32le'],
  ['float 64 bit', ['floating-point', '-b', '64'], 'pcm_f64le'],
  ['A-law', ['a-law'], 'pcm_alaw'],
  ['µ-law', ['mu-law'], 'pcm_mulaw'],
] as const;

describe.skipIf(!programs).each(codecs)('%s', (format, soxWords, ffmpegWord) => {
  it.each([1, 7])('of %i channels by sox, against ffmpeg', async (channels) => {
    await expectSame(bySox(channels, soxWords), channels, format, 'ffmpeg');
  });

  const other = format.startsWith('float') ? 'SciPy' : 'sox';
  it.each([2, 6])(`of %i channels by ffmpeg, against ${other}`, async (channels) => {
    await expectSame(byFfmpeg(channels, [ffmpegWord]), channels, format, other);
  });

  it('by ffmpeg as RF64, against ffmpeg', async () => {
    const bytes = byFfmpeg(2, [ffmpegWord, '-rf64', 'always']);
    expect(Buffer.from(bytes).toString('latin1', 0, 4)).toBe('RF64');
    await expectSame(bytes, 2, format, 'ffmpeg');
  });
});

describe.skipIf(!programs).each([codecs[2], codecs[4]])('%s through a pipe', (_, soxWords, ffmpegWord) => {
  it.each([
    ['RIFF', [], 0xffffffff],
    ['RF64', ['-rf64', 'always'], 0],
  ])('by ffmpeg as %s', async (_, args, declared) => {
    const { samples } = await ours(byFfmpeg(2, [ffmpegWord]));
    const findings = [{ code: 'open-data', severity: 'note', values: { declared } }];
    expect(await ours(byFfmpeg(2, [ffmpegWord, ...args], '-'))).toMatchObject({ samples, findings });
  });

  it('by sox, which declares nearly 2 GiB as a size that is not known', async () => {
    const { samples } = await ours(bySox(2, soxWords));
    expect(await ours(bySox(2, soxWords, '-'))).toMatchObject({ samples, findings: [{ code: 'open-data' }] });
  });
});

describe.skipIf(!programs)('codecs that are not read', () => {
  const findings = [{ code: 'unsupported-codec', severity: 'blocker' }];

  it.each(['ms-adpcm', 'ima-adpcm', 'gsm-full-rate'])('%s of sox', async (codec) => {
    expect(await ours(bySox(1, [codec]))).toMatchObject({ samples: null, findings });
  });

  it.each(['adpcm_ms', 'mp2', 'pcm_s64le'])('%s of ffmpeg', async (codec) => {
    expect(await ours(byFfmpeg(1, [codec]))).toMatchObject({ samples: null, findings });
  });
});

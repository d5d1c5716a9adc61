import { blocked, type Finding } from '../../../core/findings/finding';
import type { Levels } from '../../../core/recordings/levels';
import { openRecording } from '../../../core/recordings/openRecording';
import type { Opened, Recording } from '../../../core/recordings/recording';
import { openText } from '../../../core/recordings/text/openText';
import { surveyRecording } from '../../../core/suitability/recording/surveyRecording';
import type { FuzzInput } from '../makeInput';
import { type Watched, type Work, watch } from '../watched';
import { checkFindings, refusalFindings } from './checkFindings';

/** Times that opening may read a file: a text's head, all its rows, and its last rows once more. */
const openingPasses = 3;
/** Bytes of headers beside those: 12 to tell the format, twice, 64 for the encoding, 40 of a format. */
const headerBytes = 128;
/** Reads at most: the chunks of a WAV file that are looked at, and a few headers. */
const mostReads = 10_020;
/** Steps of the pace at most: the end of each pass, and one for each so many bytes (a sample has a byte at least). */
const fewSteps = 8;
const bytesPerStep = 32_768;
/** Samples read at a time, no divisor of the blocks inside. */
const block = 1000;
/** No sample of a file that is not made for it; memory that a reader leaves unwritten keeps it. */
const untouched = -1.2345678e-67;
/** Numbers of a text kept in memory where it is to be read again. */
const fewKept = 64;

/** Opens, reads every sample by blocks and surveys; findings' codes and `opened` where there is a recording. */
export async function readRecording({ bytes, disk }: FuzzInput): Promise<string[]> {
  const watched = watch(bytes, disk);
  const again = bytes.length % 4 === 0 && !/^(RIF|RF64|BW64|\x93NUMPY)/.test(startOf(bytes));
  const { source, pace, work } = watched;
  const { recording, findings } = again
    ? await openText(source, 'some\nfile', pace, fewKept)
    : await openRecording(source, 'some\nfile', pace);
  checkFindings(findings, bytes, null);
  checkOpened({ recording, findings });
  atMost('bytes read to open', work.bytesRead, openingPasses * bytes.length + headerBytes);
  atMost('reads to open', work.reads, mostReads);
  const codes = findings.map(({ code }) => code as string);
  if (recording !== null) {
    try {
      const found = await readAll(recording, watched, bytes, again);
      codes.push('opened', ...found.map(({ code }) => code));
    } catch (error) {
      const refused = refusalFindings(error);
      if (disk === 'steady') throw new Error(`refused after opening: ${refused.map(({ code }) => code)}`);
      if (refused.some(({ code }) => code !== 'file-changed')) throw error;
      checkFindings(refused, bytes, null);
      codes.push('opened', 'file-changed');
    }
  }
  atMost('steps', work.steps, fewSteps + bytes.length / bytesPerStep);
  return codes;
}

function startOf(bytes: Uint8Array): string {
  return String.fromCharCode(...bytes.subarray(0, 12));
}

function checkOpened({ recording, findings }: Opened): void {
  if ((recording === null) !== blocked(findings)) throw new Error('a blocker and a recording, or neither');
}

function atMost(what: string, got: number, limit: number): void {
  if (got > limit) throw new Error(`${what}: ${got} when at most ${limit} expected`);
}

async function readAll(
  recording: Recording,
  watched: Watched,
  bytes: Uint8Array,
  again: boolean,
): Promise<Finding[]> {
  const { samples, channels, sampleRate } = recording;
  if (!(samples >= 2 && channels.length >= 1))
    throw new Error(`${samples} samples of ${channels.length} channels`);
  // Every sample stands for a byte at least, so that no small file makes large arrays; a last row may do without an end.
  atMost('samples', samples * channels.length, bytes.length + 1);
  if (sampleRate !== null && !(sampleRate > 0 && sampleRate < Number.POSITIVE_INFINITY))
    throw new Error(`a sample rate of ${sampleRate}`);
  await counted(watched.work, bytes.length, again, () => readBlocks(recording));
  const { levels, findings } = await counted(watched.work, bytes.length, again, async () => {
    const survey = await surveyRecording(recording, { sampleRate: 1000 }, watched.pace);
    return { value: survey, calls: watched.work.steps };
  });
  checkFindings(findings, bytes, null);
  levels.forEach((of, channel) => {
    checkLevels(of, channel, samples);
  });
  return findings;
}

/** One pass reads a file once; where a text is not kept, every call reads at most all of it. */
async function counted<T>(
  work: Work,
  size: number,
  again: boolean,
  pass: () => Promise<{ value: T; calls: number }>,
): Promise<T> {
  const before = work.bytesRead;
  const { value, calls } = await pass();
  atMost('bytes read in one pass', work.bytesRead - before, again ? calls * size : size);
  return value;
}

async function readBlocks(recording: Recording): Promise<{ value: null; calls: number }> {
  const channels = recording.channels.map((_, channel) => channel);
  const into = channels.map(() => new Float64Array(block));
  let calls = 0;
  for (let from = 0; from < recording.samples; from += block, calls++) {
    const to = Math.min(recording.samples, from + block);
    for (const plane of into) plane.fill(untouched);
    const planes = await recording.read(channels, from, to, into);
    planes.forEach((plane, channel) => {
      if (plane.length !== to - from) throw new Error(`${plane.length} samples of [${from}, ${to})`);
      const left = plane.indexOf(untouched);
      if (left >= 0) throw new Error(`sample ${from + left} of channel ${channel} was not read`);
    });
  }
  return { value: null, calls };
}

function checkLevels({ min, max, mean, rms, notFinite }: Levels, channel: number, samples: number): void {
  const numbers = [min, max, mean, rms];
  // Where the sum of the samples is beyond all doubles, so are mean and rms.
  const summable = Math.max(max, -min) * samples < Number.POSITIVE_INFINITY;
  if ((summable && numbers.some(Number.isNaN)) || min > max)
    throw new Error(`levels ${numbers} of channel ${channel}`);
  if (notFinite !== null && !(notFinite.count > 0))
    throw new Error(`${notFinite.count} values that are not finite`);
}

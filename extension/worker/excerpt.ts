import type { Pace } from '../../core/pace';
import type { Excerpt, ExcerptRequest } from '../../core/protocol/messages';
import { eachRun, sourceOf } from './lanes';
import type { SessionResults } from './session';

/** Seconds of a recording that leave the worker at most. */
const mostSeconds = 30;

/** Samples of some lanes for listening. @throws Error where they are not there */
export async function excerptOf(
  left: SessionResults,
  { take, lanes, from, to }: ExcerptRequest,
  pace: Pace,
): Promise<Excerpt> {
  const sampleRate = left.read?.pairing?.sampleRate ?? left.recording?.opened?.recording.sampleRate ?? null;
  if (sampleRate === null) throw new Error('the sample rate is not known');
  const start = Math.max(0, Math.floor(from));
  const end = Math.max(start, Math.min(Math.ceil(to), start + mostSeconds * sampleRate));
  const found: Excerpt['lanes'] = [];
  for (const lane of lanes) {
    const source = sourceOf(left, take, lane);
    if (source !== null) {
      const last = Math.min(end, source.recording.samples);
      const [samples] = await source.recording.read([source.channel], Math.min(start, last), last);
      found.push({ lane, samples });
      continue;
    }
    const samples = new Float64Array(end - start);
    await eachRun(left, take, start, end, pace, (signals, at) => {
      samples.set(signals[lane as keyof typeof signals], at - start);
    });
    found.push({ lane, samples });
  }
  return { sampleRate, lanes: found };
}

import type { Pace } from '../pace';
import type { Means } from '../pair/signals';
import { inspectSpectra } from '../suitability/pair/inspectSpectra';
import { inspectTiming } from '../suitability/timing/inspectTiming';
import type { Pairing } from './pairing';

/**
 * The most that a linear filter of any length could take off over the fit intervals, in dB, from the coherence of the
 * signals laid over each other; null where that is withheld.
 */
export async function attainableLimit(
  { document, takes, sampleRate }: Pairing,
  means: Means,
  pace: Pace,
): Promise<number | null> {
  const { job, filter } = document;
  const timing = await inspectTiming(takes, document, means, pace);
  const lags = timing.takes.map(({ lagSamples }) => lagSamples ?? 0);
  const { together } = await inspectSpectra({ takes, job, filter, sampleRate, means, lags }, pace);
  return together.attainableDb;
}

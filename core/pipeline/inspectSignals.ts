import type { Pace } from '../pace';
import type { Means } from '../pair/signals';
import { type InspectedSpectra, inspectSpectra } from '../suitability/pair/inspectSpectra';
import { inspectTiming } from '../suitability/timing/inspectTiming';
import type { Pairing } from './pairing';

/** Timing first, so that the spectra are taken of signals that are laid over each other. */
export async function inspectSignals(
  { document, takes, sampleRate }: Pairing,
  means: Means,
  pace: Pace,
): Promise<{ timing: Awaited<ReturnType<typeof inspectTiming>>; spectra: InspectedSpectra }> {
  const { job, filter } = document;
  const timing = await inspectTiming(takes, document, means, pace);
  const lags = timing.takes.map(({ lagSamples }) => lagSamples ?? 0);
  return { timing, spectra: await inspectSpectra({ takes, job, filter, sampleRate, means, lags }, pace) };
}

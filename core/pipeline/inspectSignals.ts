import type { Means } from '../pair/signals';
import { type InspectedSpectra, inspectSpectra } from '../suitability/pair/inspectSpectra';
import { inspectTiming } from '../suitability/timing/inspectTiming';
import type { Work } from './host';
import type { Pairing } from './pairing';
import { inspectionKey } from './stageKeys';

export interface InspectedSignals {
  timing: Awaited<ReturnType<typeof inspectTiming>>;
  spectra: InspectedSpectra;
}

/** Timing first, so that the spectra are taken of signals that are laid over each other. */
export async function inspectSignals(
  pairing: Pairing,
  means: Means,
  { pace, keep }: Work,
): Promise<InspectedSignals> {
  const { document, takes, sampleRate } = pairing;
  const { job, filter } = document;
  return keep('spectra', inspectionKey(pairing), async () => {
    const timing = await inspectTiming(takes, document, means, pace);
    const lags = timing.takes.map(({ lagSamples }) => lagSamples ?? 0);
    const spectra = await inspectSpectra({ takes, job, filter, sampleRate, means, lags }, pace);
    return { timing, spectra };
  });
}

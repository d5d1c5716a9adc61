import type { Interval } from '../../pair/intervals';
import type { SignalReader } from '../../pair/signals';
import { type CrossSpectra, type CrossSpectraGatherer, newCrossSpectra } from '../../spectra/crossSpectra';

/** Spectra of an input x and a desired signal d as the lag needs them: bins 0..segment/2. */
export interface PairSpectra {
  /** Samples of a segment. */
  segment: number;
  /** Segments averaged. */
  averages: number;
  /** |X|². */
  input: Float64Array;
  /** |D|². */
  desired: Float64Array;
  /** conj(X) D. */
  crossRe: Float64Array;
  crossIm: Float64Array;
}

/** A gatherer for one input and the desired signal; frequencies are counted in bins. */
export function newPairSpectra(segment: number): CrossSpectraGatherer {
  return newCrossSpectra(2, segment, 1);
}

/**
 * Brings a window as a run of its own. First differences of both signals are taken: they leave coherence and phase as
 * they are and keep slow drifts from leaking into the other bins.
 * @param read of one input and the desired signal, delayed by minus the lag to be taken off
 */
export async function pushWindow(
  gatherer: CrossSpectraGatherer,
  read: SignalReader,
  { from, to }: Interval,
): Promise<void> {
  const { inputs, desired } = await read(from, to);
  gatherer.gap();
  gatherer.push([differences(inputs[0]), differences(desired)]);
}

/** Samples that hold `segments` half-overlapped segments and the sample before them. */
export function windowFor(segment: number, segments: number): number {
  return (segment / 2) * (segments + 1) + 1;
}

export function pairSpectra({ segment, averages, between }: CrossSpectra): PairSpectra {
  return {
    segment,
    averages,
    input: between[0][0].re,
    desired: between[1][1].re,
    crossRe: between[0][1].re,
    crossIm: between[0][1].im,
  };
}

function differences(samples: Float64Array): Float64Array {
  return Float64Array.from({ length: samples.length - 1 }, (_, k) => samples[k + 1] - samples[k]);
}

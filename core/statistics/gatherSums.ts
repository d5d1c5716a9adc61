import type { Windowing } from '../document/pairingDocument';
import type { Pace } from '../pace';
import type { BandFilter } from '../pair/bandFilter';
import { bandReader } from '../pair/bandSignals';
import { type Interval, totalLength } from '../pair/intervals';
import { type Means, type SignalReader, signalReader } from '../pair/signals';
import type { Take } from '../pair/take';
import { usedSegments } from '../pair/usedSegments';
import { bandFloor } from './bandFloor';
import { addSums, emptySums, type NormalSums } from './normalSums';
import { sumStretch } from './sumStretch';

export interface FilterShape {
  /** M, taps per input. */
  length: number;
  /** Δ in samples. */
  delay: number;
  windowing: Windowing;
  /** The band that the error is weighted to; none: all frequencies count alike. */
  band?: BandFilter | null;
}

/**
 * The sums of the normal equations over the fit intervals of all takes.
 * `covariance`: over the usable n of each interval, with the true samples before it. `autocorrelation`: each interval
 * on its own, every signal zero outside it, over all n (those beyond `from + M - 1 + length` have no input left).
 * Weighted to a band: all signals pass the band filter first, and a share of the raw normal matrix over the same n is
 * added ({@link bandFloor}).
 */
export async function gatherSums(
  takes: readonly Take[],
  shape: FilterShape,
  means: Means,
  pace: Pace,
): Promise<NormalSums> {
  const inputs = takes[0].inputs.length;
  const total = emptySums(inputs, shape.length);
  for (const take of takes) {
    addSums(
      total,
      shape.windowing === 'covariance'
        ? await covarianceSums(take, shape, means, pace)
        : await autocorrelationSums(take, shape, means, pace),
    );
  }
  return total;
}

async function covarianceSums(take: Take, shape: FilterShape, means: Means, pace: Pace): Promise<NormalSums> {
  const { length, delay, band } = shape;
  const sums = emptySums(take.inputs.length, length);
  const read = signalReader(take, { means, delay, reuse: true });
  const weighted = band ? bandReader(read, band) : read;
  for (const segment of usedSegments(take, take.fit, length, delay, band?.history)) {
    const sum = (from: SignalReader) => sumStretch(from, segment, take.inputs.length, length, true, pace);
    addSums(sums, await sum(weighted));
    if (band) addSums(sums, bandFloor(await sum(read)));
    sums.count += segment.to - segment.from;
  }
  return sums;
}

async function autocorrelationSums(
  take: Take,
  shape: FilterShape,
  means: Means,
  pace: Pace,
): Promise<NormalSums> {
  const { length, delay, band } = shape;
  const sums = emptySums(take.inputs.length, length);
  const late = band?.history ?? 0;
  for (const interval of take.fit) {
    const read = signalReader(take, { means, delay, support: interval, reuse: true });
    const weighted = band ? bandReader(read, band) : read;
    const stretch: Interval = { from: interval.from, to: interval.to + length - 1 + late };
    const sum = (from: SignalReader) => sumStretch(from, stretch, take.inputs.length, length, false, pace);
    const more = await sum(weighted);
    more.desiredEnergy = await supportedEnergy(weighted, interval.from + delay, interval.to + delay + late);
    addSums(sums, more);
    if (band) addSums(sums, bandFloor(await sum(read)));
  }
  sums.count += totalLength(take.fit);
  return sums;
}

/** Σ d² over the n at which the delayed desired signal is not zero, which the stretch of the input need not cover. */
async function supportedEnergy(read: SignalReader, from: number, to: number): Promise<number> {
  let energy = 0;
  const block = 65536;
  for (let start = from; start < to; start += block) {
    const { desired } = await read(start, Math.min(to, start + block));
    for (let k = 0; k < desired.length; k++) energy += desired[k] * desired[k];
  }
  return energy;
}

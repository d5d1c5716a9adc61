import type { Interval } from '../../pair/intervals';
import { noMeans, signalReader } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { spreadOver } from './gatherSpectra';

/** Samples that show the step of numbers in a text. */
const budget = 16384;

/** Digits after the point that are tried; finer steps make no noise that could matter beside a sensor's. */
const mostDigits = 6;

/** Values are whole multiples of a step where they are this near to one, relative to themselves. */
const wholeEnough = 1e-9;

/**
 * Density of the noise that rounding to the recording's own steps makes of each input, q²/12 spread evenly (Bennett,
 * Bell Syst. Tech. J. 1948), in unit²/Hz: the floor below which a recording shows no signal. 0 where the step is not
 * known: A-law and µ-law, and numbers with a point that floats.
 * @param stretches of n that are looked at
 * @param sampleRate in Hz
 */
export async function converterNoise(
  take: Take,
  stretches: readonly Interval[],
  sampleRate: number,
): Promise<number[]> {
  const none = noMeans(take.inputs.length);
  const read = signalReader(take, { means: none, delay: 0 });
  const rows: Float64Array[][] = take.inputs.map(() => []);
  for (const { from, to } of spreadOver(stretches, budget)) {
    const { inputs } = await read(from, to);
    inputs.forEach((samples, r) => {
      rows[r].push(samples);
    });
  }
  return take.inputs.map(({ recording: { pcm, bits } }, r) => {
    const step = pcm ? pcmStep(bits) : decimalStep(rows[r]);
    return (step * step) / (6 * sampleRate);
  });
}

/** Of full scale 1. */
function pcmStep(bits: number | undefined): number {
  if (bits === undefined) return 0;
  let step = 1;
  for (let bit = 1; bit < bits; bit++) step /= 2;
  return step;
}

/** The largest of 1, 0.1, 0.01 … that all values are multiples of; 0 where there is none. */
function decimalStep(rows: readonly Float64Array[]): number {
  let scale = 1;
  for (let digits = 0; digits <= mostDigits; digits++) {
    const whole = (value: number) => {
      const scaled = value * scale;
      return Math.abs(scaled - Math.round(scaled)) <= wholeEnough * Math.abs(scaled);
    };
    if (rows.every((row) => row.every(whole))) return 1 / scale;
    scale *= 10;
  }
  return 0;
}

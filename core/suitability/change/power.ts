import type { Pace } from '../../pace';
import { type Interval, totalLength } from '../../pair/intervals';
import type { SignalReader } from '../../pair/signals';
import { newWelch } from '../../spectra/welch';
import { powerOfTwo, windowsOver } from '../blocks/windows';

/** How the power of a signal differs between parts of a recording. */
export interface PowerChange {
  /** Power of the loudest part over that of the quietest. */
  ratio: number;
  /** The ratio that chance exceeds in about one of ten thousand recordings. */
  chance: number;
  /** The part that is furthest from the mean. */
  part: Interval;
  /** Its power over the mean power. */
  level: number;
}

const mostWindows = 128;
const largestWindow = 4096;
/** Fewer samples are no measure of a power. */
const smallestWindow = 32;

/** Where chance alone may give more, a part holds fewer than 40 independent values: too few for the χ² it rests on. */
const mostChance = 6;

/** Standard normal point: of eight parts, one is beyond it on either side in two thousand recordings. */
const z = 4;

/**
 * Mean squares over eight parts (four of a short recording), each from up to 16 windows spread over it.
 * The spread that chance gives them is the larger of two: that of Gaussian noise of the signal's own spectrum,
 * 2 Σρ² / T (Bendat & Piersol, *Random Data*, ch. 8, from memory; lines count as narrow-band noise, which overstates
 * it), and that which the windows inside the parts show, with allowance for their correlation.
 * @param pick the signal out of what is read
 * @returns null where the parts are too short for the signal's correlation, or without power
 */
export async function powerChange(
  read: SignalReader,
  pick: (signals: Awaited<ReturnType<SignalReader>>) => Float64Array,
  intervals: readonly Interval[],
  pace: Pace,
): Promise<PowerChange | null> {
  const total = totalLength(intervals);
  const size = Math.min(largestWindow, Math.max(smallestWindow, Math.floor(total / mostWindows)));
  const windows = windowsOver(intervals, size, mostWindows);
  const count = windows.length >= 64 ? 8 : 4;
  const each = Math.floor(windows.length / count);
  if (each < 4) return null;
  const welch = newWelch(1, powerOfTwo(size, smallestWindow, largestWindow), 1);
  const powers: number[] = [];
  for (const { from, to } of windows.slice(0, count * each)) {
    const samples = pick(await read(from, to));
    welch.gap();
    welch.push([samples]);
    powers.push(samples.reduce((sum, value) => sum + value * value, 0) / size);
    await pace.step('change', powers.length, windows.length);
  }
  const parts = Array.from({ length: count }, (_, b) => mean(powers.slice(b * each, (b + 1) * each)));
  const level = mean(parts);
  if (!(level > 0)) return null;
  const variance = Math.max(
    gaussianVariance(welch.densities()[0], each * size),
    varianceInside(powers, parts, each) / (level * level),
  );
  const chance = chanceRatio(variance);
  if (chance > mostChance) return null;
  const furthest = parts.reduce((best, p, b) => (apart(p) > apart(parts[best]) ? b : best), 0);
  return {
    ratio: Math.max(...parts) / Math.min(...parts),
    chance,
    part: { from: windows[furthest * each].from, to: windows[(furthest + 1) * each - 1].to },
    level: parts[furthest] / level,
  };

  function apart(power: number): number {
    return Math.max(power / level, level / power);
  }
}

/** Relative variance of a mean square over so many samples of Gaussian noise of a one-sided spectrum. */
function gaussianVariance(density: Float64Array, samples: number): number {
  const sum = density.reduce((a, b) => a + b, 0);
  const squares = density.reduce((a, b) => a + b * b, 0);
  const segment = 2 * (density.length - 1);
  return (segment * squares) / (sum * sum) / samples;
}

/** Variance of a part's mean from that of its windows, whose powers follow on each other as a first-order process. */
function varianceInside(powers: readonly number[], parts: readonly number[], each: number): number {
  let squares = 0;
  let products = 0;
  powers.forEach((power, i) => {
    const rest = power - parts[Math.floor(i / each)];
    squares += rest * rest;
    if (i % each > 0) products += rest * (powers[i - 1] - parts[Math.floor(i / each)]);
  });
  const freedom = parts.length * (each - 1);
  // The deviations from the parts' own means lean to the other side by 1/each.
  const correlation = squares > 0 ? Math.min(0.9, Math.max(0, products / squares + 1 / each)) : 0;
  return ((squares / freedom / each) * (1 + correlation)) / (1 - correlation);
}

/** Ratio of the points ±z of a power of that relative variance, as of χ² (Wilson & Hilferty 1931). */
function chanceRatio(variance: number): number {
  const ninth = variance / 9;
  const cube = (side: number) => {
    const root = 1 - ninth + side * z * Math.sqrt(ninth);
    return root * root * root;
  };
  return cube(-1) > 0 ? cube(1) / cube(-1) : Number.POSITIVE_INFINITY;
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

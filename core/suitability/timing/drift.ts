import type { Pace } from '../../pace';
import { type Means, signalReader } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { studentPoint } from '../blocks/studentPoint';
import { middleOf } from '../blocks/windows';
import { type Alignment, median } from './alignment';
import { alignedRuns, type Lag, standsOut } from './lag';
import { type Line, weightedLine } from './line';
import { newPairSpectra, type PairSpectra, pairSpectra, pushWindow } from './pairSpectra';
import { phasePeak } from './phasePeak';
import { trustedBins } from './trustedBins';

/** How the lag between files of two clocks changes along the recording. */
export interface Drift {
  /** Parts in a million by which the lag grows: positive where the desired signal's clock is the faster. */
  ppm: number;
  /** From the scatter of the windows about the straight line. */
  standardError: number;
  /** Samples by which the lag changes from the first fit sample to the last. */
  cost: number;
  /** Whether that is more than chance. */
  proved: boolean;
  /** Lag in the middle of the fit. */
  lag: Lag;
}

/** Half-overlapped segments to a window: enough for the coherence of a window to mean something. */
const segments = 8;
const mostWindows = 32;
/** A line through fewer windows leaves its own scatter unknown. */
const fewestWindows = 6;
/** Windows further off than this many median deviations are taken for mishaps (a pause, another sound). */
const outlier = 10;

/**
 * Lags of windows spread over the fit by the phase transform, and a weighted straight line through them.
 * Null where the lag cannot be told in six windows or more.
 * @param take with one input, of another file than the desired signal
 */
export async function lagCourse(
  take: Take,
  means: Means,
  alignment: Alignment,
  pace: Pace,
): Promise<Drift | null> {
  const { segment, runs } = alignedRuns(take, alignment, { segments, parts: 80, most: mostWindows });
  if (runs.length < fewestWindows) return null;
  const windows: AlignedWindow[] = [];
  for (const { window, offset } of runs) {
    const gatherer = newPairSpectra(segment);
    await pushWindow(gatherer, signalReader(take, { means, delay: -offset }), window);
    windows.push({ middle: middleOf(window), offset, spectra: pairSpectra(gatherer.spectra()) });
    await pace.step('timing', windows.length, runs.length);
  }
  const points = lagsOf(windows);
  const line = points === null ? null : robustLine(points);
  if (points === null || line === null) return null;
  const from = take.fit[0].from;
  const to = take.fit[take.fit.length - 1].to;
  return {
    ppm: line.slope * 1e6,
    standardError: line.standardError * 1e6,
    cost: Math.abs(line.slope) * (to - from),
    proved: Math.abs(line.slope) > studentPoint(line.freedom) * line.standardError,
    lag: {
      samples: line.value + line.slope * ((from + to) / 2 - line.at),
      height: median(points.map((point) => point.height)),
    },
  };
}

interface AlignedWindow {
  middle: number;
  /** Taken off before the spectra. */
  offset: number;
  spectra: PairSpectra;
}

interface Point {
  middle: number;
  lag: number;
  height: number;
}

/** The lag of each window where it stands out; null where it does so in fewer than six. */
function lagsOf(windows: readonly AlignedWindow[]): Point[] | null {
  const trusted = trustedBins(windows.map((window) => window.spectra));
  const points: Point[] = [];
  for (const { middle, offset, spectra } of windows) {
    const peak = phasePeak(spectra, trusted);
    if (standsOut(peak)) points.push({ middle, lag: offset + peak.lag, height: peak.height });
  }
  return points.length < fewestWindows ? null : points;
}

/** The line through all points, and again without those that are far off it. */
function robustLine(points: readonly Point[]): Line | null {
  const first = lineThrough(points);
  if (first === null) return null;
  const distance = ({ middle, lag }: Point) =>
    Math.abs(lag - first.value - first.slope * (middle - first.at));
  const limit = outlier * median(points.map(distance));
  const near = points.filter((point) => distance(point) <= limit);
  return near.length >= fewestWindows ? lineThrough(near) : first;
}

function lineThrough(points: readonly Point[]): Line | null {
  return weightedLine(
    points.map((point) => point.middle),
    points.map((point) => point.lag),
    points.map(({ height }) => weightOf(height)),
  );
}

/**
 * The mean cosine h of the phase errors gives their variance, about -2 ln h ≈ (1 - h²)/h²; the variance of the lag is
 * in proportion. Held at h = 0.95, beyond which other errors count.
 */
function weightOf(height: number): number {
  const h = Math.min(height, 0.95);
  return (h * h) / (1 - h * h);
}

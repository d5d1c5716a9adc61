import type { Pace } from '../../pace';
import { type Interval, totalLength } from '../../pair/intervals';
import { type Means, signalReader } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { usedSegments } from '../../pair/usedSegments';
import { middleOf, powerOfTwo, windowsOver } from '../blocks/windows';
import { type Alignment, offsetAt } from './alignment';
import { newPairSpectra, pairSpectra, pushWindow, windowFor } from './pairSpectra';
import { near, type PhasePeak, phasePeak } from './phasePeak';
import { trustedBins } from './trustedBins';

/** The lag between an input and the desired signal as one constant. */
export interface Lag {
  /**
   * Positive where the desired signal comes later. Fractional where one delay explains the phases; whole, and known to
   * within three samples, where the path turns them.
   */
  samples: number;
  /** 0..1: 1 where the desired signal is the input, delayed, in all bins that count. */
  height: number;
}

/**
 * By how much the peak must stand above the next one, as a share of full height: with less, the input's band is so
 * narrow (about half an octave) or its period so plain that the lag could be another.
 */
const margin = 0.1;

const longestSegment = 4096;
/** Runs of segments over the fit: enough for the coherence of one bin to be known to a tenth. */
const mostWindows = 64;

/** Where segments are taken: runs of samples aligned by whole samples. */
export interface AlignedRuns {
  segment: number;
  runs: { window: Interval; offset: number }[];
}

/**
 * Windows spread over the fit intervals in which the input and the aligned desired signal may be used.
 * @param take with one input
 * @param segments half-overlapped segments to a window
 * @param parts segments that at least fit side by side into the fit
 */
export function alignedRuns(
  take: Take,
  alignment: Alignment,
  { segments, parts, most }: { segments: number; parts: number; most: number },
): AlignedRuns {
  const ends = [take.fit[0].from, take.fit[take.fit.length - 1].to].map((n) => offsetAt(alignment, n));
  const usable = ends.reduce((runs, offset) => usedSegments(take, runs, 1, -offset), take.fit);
  const longest = Math.max(0, ...usable.map(({ from, to }) => to - from));
  const segment = powerOfTwo(
    Math.min(totalLength(usable) / parts, (2 * (longest - 1)) / (segments + 1)),
    64,
    longestSegment,
  );
  const runs = windowsOver(usable, windowFor(segment, segments), most).map((window) => ({
    window,
    offset: offsetAt(alignment, middleOf(window)),
  }));
  return { segment, runs };
}

/**
 * The constant lag by the phase transform over the whole fit, to better than 0.1 sample for a pure delay in wide band.
 * Null where nothing stands out: no relation, too narrow a band, a periodic input, or a path without one delay.
 * @param alignment with slope 0
 */
export async function constantLag(
  take: Take,
  means: Means,
  alignment: Alignment,
  pace: Pace,
): Promise<Lag | null> {
  for (const parts of [8, 64]) {
    const lag = await lagBySegments(take, means, alignment, parts, pace);
    if (lag !== null) return lag;
  }
  return null;
}

/** Long segments part a narrow band into more bins; short ones average more against noise. */
async function lagBySegments(
  take: Take,
  means: Means,
  alignment: Alignment,
  parts: number,
  pace: Pace,
): Promise<Lag | null> {
  const { segment, runs } = alignedRuns(take, alignment, { segments: 3, parts, most: mostWindows });
  const first = await peakAt(0);
  if (first === null) return null;
  // The phases of lines do not turn with the lag inside a line: aligned otherwise they show another lag. Aligned
  // earlier rather than later, so that the window favours the first arrival over what comes after it.
  const again = await peakAt(-segment / 4);
  return again !== null && Math.abs(again.samples - first.samples) <= near ? first : null;

  async function peakAt(shift: number): Promise<Lag | null> {
    const gatherer = newPairSpectra(segment);
    for (const { window, offset } of runs) {
      await pushWindow(gatherer, signalReader(take, { means, delay: -offset - shift }), window);
      await pace.step('timing', gatherer.averages, 3 * runs.length);
    }
    if (gatherer.averages === 0) return null;
    const spectra = pairSpectra(gatherer.spectra());
    const peak = phasePeak(spectra, trustedBins([spectra]));
    if (!standsOut(peak)) return null;
    const samples = runs[0].offset + shift + peak.lag;
    const sharp = peak.height - peak.beside > margin;
    return { samples: sharp ? samples : Math.round(samples), height: peak.height };
  }
}

/** Whether a peak is more than chance and the only one of its kind. */
export function standsOut({ height, rival, chance }: PhasePeak): boolean {
  return height > chance && height - rival > margin;
}

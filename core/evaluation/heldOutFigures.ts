import { decibelsOfE } from '../figures/decibels';
import { type TargetFilter, targetSimulator } from '../numbers/targetFilter';
import type { Pace } from '../pace';
import { welchSegment } from '../spectra/welch';
import { countsReader } from './countsReader';
import { type ErrorSpectra, newErrorSpectra } from './errorSpectra';
import { blockCount, type ErrorTally, newErrorTally, relativeStandardError } from './errorTally';
import { type Filter, filterLength } from './filter';
import { filterStretch } from './filterStretch';
import { type ErrorFigure, errorFigure } from './fitFigure';
import type { Run } from './measuredRuns';
import { newTargetTally, type TargetFigures, type TargetTally } from './targetTally';
import { newWeighing } from './weighing';

export interface TakeFigure extends ErrorFigure {
  name: string;
  /** Of `nmseDb`, from blocks; null where there are too few blocks. */
  standardErrorDb: number | null;
}

/** One-sided power spectral densities of what the figures are taken over. */
export interface SpectraFigures {
  /** Samples of a segment, Hann window, half overlap. */
  segment: number;
  averages: number;
  /** Hz, `segment / 2 + 1` values. */
  frequencies: Float64Array;
  /** Of d[n-Δ], of the output y and of the error e, in unit²/Hz. */
  desired: Float64Array;
  output: Float64Array;
  error: Float64Array;
}

export interface Evaluation {
  /** In the band that the error is weighted to, as all figures but the next and the spectra. */
  total: ErrorFigure;
  /** NMSE of what lies outside that band, in dB; null where there is nothing outside. */
  outsideBandDb: number | null;
  takes: TakeFigure[];
  spectra: SpectraFigures;
  target: TargetFigures;
}

/** Of the spectra, where there are samples enough. */
const longestSegment = 2048;

/**
 * Filters the runs, as computed in doubles and as the target computes it, and takes all figures in one go.
 * @param sampleRate in Hz
 */
export async function evaluate(
  runs: readonly Run[],
  filter: Filter,
  target: TargetFilter,
  sampleRate: number,
  pace: Pace,
): Promise<Evaluation> {
  const samples = runs.reduce((sum, run) => sum + run.samples, 0);
  const segment = welchSegment(samples, longestSegment);
  const spectra = newErrorSpectra(segment, sampleRate);
  const targetTally = newTargetTally();
  const outside = newErrorTally(1, 1);
  const takes: TakeFigure[] = [];
  let errorEnergy = 0;
  let desiredEnergy = 0;
  for (const run of runs) {
    const tally = newErrorTally(run.samples, blockCount(run.samples, filterLength(filter)));
    await evaluateRun(run, filter, target, pace, { tally, outside, spectra, targetTally });
    takes.push({ name: run.take.name, ...takeFigure(tally) });
    errorEnergy += tally.errorEnergy;
    desiredEnergy += tally.desiredEnergy;
  }
  const total = errorFigure(samples, errorEnergy, desiredEnergy);
  const { desired, output, error } = spectra.densities();
  const frequencies = desired.map((_, f) => (f * sampleRate) / segment);
  return {
    total,
    outsideBandDb:
      filter.band && outside.desiredEnergy > 0
        ? errorFigure(outside.samples, outside.errorEnergy, outside.desiredEnergy).nmseDb
        : null,
    takes,
    spectra: { segment, averages: spectra.averages, frequencies, desired, output, error },
    target: targetTally.figures(total, desiredEnergy),
  };
}

interface Sinks {
  tally: ErrorTally;
  outside: ErrorTally;
  spectra: ErrorSpectra;
  targetTally: TargetTally;
}

async function evaluateRun(
  { take, segments }: Run,
  filter: Filter,
  target: TargetFilter,
  pace: Pace,
  { tally, outside, spectra, targetTally }: Sinks,
): Promise<void> {
  const { read, counts } = countsReader(take, filter, target);
  const simulate = targetSimulator(target);
  const { outputCount } = target.scaling;
  const weighing = newWeighing(filter.band);
  for (const stretch of segments) {
    spectra.gap();
    const whole = weighing.begin(stretch);
    await filterStretch(read, whole, filter.coefficients, pace, (block) => {
      const { from } = block;
      const run = simulate(counts(from, from + block.desired.length));
      targetTally.count(run);
      const weighed = weighing.push([block.desired, block.output, run.output]);
      if (weighed === null) return;
      spectra.push(weighed.raw[0], weighed.raw[1]);
      const [d, y, counted] = weighed.inside;
      tally.add(d, y);
      targetTally.add(d, y, counted, outputCount);
      if (weighed.outside !== null) outside.add(weighed.outside[0], weighed.outside[1]);
    });
  }
}

function takeFigure(tally: ErrorTally): ErrorFigure & { standardErrorDb: number | null } {
  const relative = relativeStandardError(tally.blocks);
  return {
    ...errorFigure(tally.samples, tally.errorEnergy, tally.desiredEnergy),
    // To first order: d(10 log10 r) = (10 / ln 10) dr / r.
    standardErrorDb: relative === null ? null : decibelsOfE * relative,
  };
}

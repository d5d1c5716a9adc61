import { type TargetFilter, targetInput, targetSimulator } from '../numbers/targetFilter';
import type { Pace } from '../pace';
import { signalReader } from '../pair/signals';
import { newWelch, type Welch } from '../spectra/welch';
import { blockCount, type ErrorTally, newErrorTally, relativeStandardError } from './errorTally';
import { type Filter, filterLength } from './filter';
import { filterStretch } from './filterStretch';
import { type ErrorFigure, errorFigure } from './fitFigure';
import type { Run } from './measuredRuns';
import { newTargetTally, type TargetFigures, type TargetTally } from './targetTally';

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
  total: ErrorFigure;
  takes: TakeFigure[];
  spectra: SpectraFigures;
  target: TargetFigures;
}

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
  const segment = welchSegment(runs);
  const welch = newWelch(3, segment, sampleRate);
  const targetTally = newTargetTally();
  const takes: TakeFigure[] = [];
  let errorEnergy = 0;
  let desiredEnergy = 0;
  for (const run of runs) {
    const tally = newErrorTally(run.samples, blockCount(run.samples, filterLength(filter)));
    await evaluateRun(run, filter, target, pace, { tally, welch, targetTally });
    takes.push({ name: run.take.name, ...takeFigure(tally) });
    errorEnergy += tally.errorEnergy;
    desiredEnergy += tally.desiredEnergy;
  }
  const samples = runs.reduce((sum, run) => sum + run.samples, 0);
  const total = errorFigure(samples, errorEnergy, desiredEnergy);
  const [desired, output, error] = welch.densities();
  const frequencies = desired.map((_, f) => (f * sampleRate) / segment);
  return {
    total,
    takes,
    spectra: { segment, averages: welch.averages, frequencies, desired, output, error },
    target: targetTally.figures(total, desiredEnergy),
  };
}

interface Sinks {
  tally: ErrorTally;
  welch: Welch;
  targetTally: TargetTally;
}

async function evaluateRun(
  run: Run,
  filter: Filter,
  target: TargetFilter,
  pace: Pace,
  sinks: Sinks,
): Promise<void> {
  const { take } = run;
  const history = filterLength(filter) - 1;
  const read = signalReader(take, { means: filter.means, delay: filter.delay });
  const none = { inputs: take.inputs.map(() => 0), desired: 0 };
  const readRaw = signalReader(take, { means: none, delay: filter.delay });
  const simulate = targetSimulator(target);
  for (const stretch of run.segments) {
    sinks.welch.gap();
    await filterStretch(read, stretch, filter.coefficients, pace, async ({ from, desired, output }) => {
      sinks.tally.add(desired, output);
      sinks.welch.push([desired, output, desired.map((d, n) => d - output[n])]);
      const raw = await readRaw(from, from + desired.length, history);
      const simulation = simulate(raw.inputs.map((x, r) => targetInput(target, r, x)));
      sinks.targetTally.add(desired, output, simulation.output, target.scaling.outputCount);
      sinks.targetTally.count(simulation);
    });
  }
}

function takeFigure(tally: ErrorTally): ErrorFigure & { standardErrorDb: number | null } {
  const relative = relativeStandardError(tally.blocks);
  return {
    ...errorFigure(tally.samples, tally.errorEnergy, tally.desiredEnergy),
    // To first order: d(10 log10 r) = (10 / ln 10) dr / r.
    standardErrorDb: relative === null ? null : 4.342944819032518 * relative,
  };
}

/** A power of two: a sixteenth of the samples at most, so that there is something to average, and 64 to 2,048. */
function welchSegment(runs: readonly Run[]): number {
  const samples = runs.reduce((sum, run) => sum + run.samples, 0);
  let segment = 64;
  while (segment < 2048 && 32 * segment <= samples) segment *= 2;
  return segment;
}

import { powerDecibels } from '../figures/decibels';
import { type TargetFilter, targetInput, targetSimulator } from '../numbers/targetFilter';
import type { Pace } from '../pace';
import { signalReader } from '../pair/signals';
import { newWelch, type Welch } from '../spectra/welch';
import { blockCount, type ErrorTally, newErrorTally, relativeStandardError } from './errorTally';
import { type Filter, filterLength } from './filter';
import { filterStretch } from './filterStretch';
import { type ErrorFigure, errorFigure } from './fitFigure';
import type { Run } from './measuredRuns';

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

/** The target's filter beside the ideal one over the same n. */
export interface TargetFigures {
  nmseDb: number;
  /** Rise of the NMSE in dB. */
  quantisationLossDb: number;
  /** `10 log10(Σ(y_q - y)² / Σ y²)`. */
  outputErrorDb: number;
  accumulatorOverflows: number;
  outputOverflows: number;
  samples: number;
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
      sinks.targetTally.add(desired, output, simulation, target.scaling.outputCount);
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

interface TargetTally {
  add(
    desired: Float64Array,
    output: Float64Array,
    simulation: { output: Float64Array; accumulatorOverflows: number; outputOverflows: number },
    outputCount: number,
  ): void;
  figures(ideal: ErrorFigure, desiredEnergy: number): TargetFigures;
}

function newTargetTally(): TargetTally {
  let errorEnergy = 0;
  let gapEnergy = 0;
  let outputEnergy = 0;
  const counts = { accumulatorOverflows: 0, outputOverflows: 0, samples: 0 };
  return {
    add(desired, output, simulation, outputCount) {
      for (let n = 0; n < desired.length; n++) {
        const y = simulation.output[n] * outputCount;
        const e = desired[n] - y;
        const gap = y - output[n];
        errorEnergy += e * e;
        gapEnergy += gap * gap;
        outputEnergy += output[n] * output[n];
      }
      counts.accumulatorOverflows += simulation.accumulatorOverflows;
      counts.outputOverflows += simulation.outputOverflows;
      counts.samples += desired.length;
    },
    figures(ideal, desiredEnergy) {
      const nmseDb = powerDecibels(errorEnergy / desiredEnergy);
      return {
        nmseDb,
        quantisationLossDb: nmseDb - ideal.nmseDb,
        outputErrorDb: powerDecibels(gapEnergy / outputEnergy),
        ...counts,
      };
    },
  };
}

/** A power of two: a sixteenth of the samples at most, so that there is something to average, and 64 to 2,048. */
function welchSegment(runs: readonly Run[]): number {
  const samples = runs.reduce((sum, run) => sum + run.samples, 0);
  let segment = 64;
  while (segment < 2048 && 32 * segment <= samples) segment *= 2;
  return segment;
}

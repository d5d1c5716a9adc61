import { realSums } from '../numbers/exactSums';
import { type TargetFilter, targetSimulator } from '../numbers/targetFilter';
import { clamp, powerOfTwo, roundHalfUp, wordRange } from '../numbers/words';
import type { Pace } from '../pace';
import { type Interval, totalLength } from '../pair/intervals';
import { countsReader } from './countsReader';
import { newErrorTally } from './errorTally';
import type { Filter } from './filter';
import { filterStretch } from './filterStretch';
import { errorFigure } from './fitFigure';
import type { Run } from './measuredRuns';
import { type LossFigures, newTargetTally } from './targetTally';
import { newWeighing } from './weighing';

/** One block as a variant sees it; every input begins with M-1 samples of history. */
export interface StudyBlock {
  /** Means taken off, exact. */
  inputs: Float64Array[];
  /** What the target's filter sees, in counts. */
  counts: Float64Array[];
  /** The ideal output. */
  output: Float64Array;
}

/** A way of computing the output, in output counts. */
export type Variant = (block: StudyBlock) => Float64Array;

export interface Study {
  /** Number of n. */
  samples: number;
  /** One entry a variant. */
  figures: LossFigures[];
}

/** Samples that tell a loss well enough: it is the difference of two errors over the same samples. */
export const studySamples = 65536;

/**
 * Runs several variants of a filter over the same n, evenly spread where there are many.
 * @param target of which the inputs' counts are taken
 */
export async function studyVariants(
  runs: readonly Run[],
  filter: Filter,
  target: TargetFilter,
  variants: readonly Variant[],
  pace: Pace,
): Promise<Study> {
  const ideal = newErrorTally(1, 1);
  const weighing = newWeighing(filter.band);
  const tallies = variants.map(newTargetTally);
  const total = runs.reduce((sum, run) => sum + run.samples, 0);
  for (const { take, segments, samples } of runs) {
    const { read, counts } = countsReader(take, filter, target);
    for (const stretch of spread(segments, Math.ceil((studySamples * samples) / total))) {
      await filterStretch(read, weighing.begin(stretch), filter.coefficients, pace, (block) => {
        const { from, desired, output, inputs } = block;
        const seen = counts(from, from + desired.length);
        const outputs = variants.map((variant) => variant({ inputs, counts: seen, output }));
        const weighed = weighing.push([desired, output, ...outputs]);
        if (weighed === null) return;
        const [d, y, ...written] = weighed.inside;
        ideal.add(d, y);
        written.forEach((row, v) => {
          tallies[v].add(d, y, row, target.scaling.outputCount);
        });
      });
    }
  }
  const figure = errorFigure(ideal.samples, ideal.errorEnergy, ideal.desiredEnergy);
  return {
    samples: ideal.samples,
    figures: tallies.map((tally) => {
      const { nmseDb, quantisationLossDb, outputErrorDb } = tally.figures(figure, ideal.desiredEnergy);
      return { nmseDb, quantisationLossDb, outputErrorDb };
    }),
  };
}

/** The target's own arithmetic. */
export function targetVariant(target: TargetFilter): Variant {
  const simulate = targetSimulator(target);
  return ({ counts }) => simulate(counts).output;
}

/** Each rounding of an integer target by itself: of the inputs, of the taps, of the output. */
export function shareVariants(
  target: TargetFilter,
  coefficients: readonly Float64Array[],
  fractionBits: number,
  outputWord: number,
): Record<'input' | 'taps' | 'output', Variant> {
  const { inputCount, outputCount } = target.scaling;
  const unit = powerOfTwo(-fractionBits);
  const onCounts = realSums(coefficients.map((row, r) => row.map((w) => (w * inputCount[r]) / outputCount)));
  const onInputs = realSums(target.values.map((row, r) => row.map((v) => (v * unit) / inputCount[r])));
  const range = wordRange(outputWord);
  return {
    input: ({ counts }) => onCounts(counts),
    taps: ({ inputs }) => onInputs(inputs),
    output: ({ output }) => output.map((y) => clamp(roundHalfUp(y / outputCount), range)),
  };
}

/** At most so many n in up to 16 stretches spread evenly over the intervals, which come in order. */
function spread(intervals: readonly Interval[], most: number): Interval[] {
  const total = totalLength(intervals);
  if (total <= most) return [...intervals];
  const pieces = 16;
  const size = Math.ceil(most / pieces);
  const stretches: Interval[] = [];
  for (let p = 0; p < pieces; p++) {
    let start = Math.floor((p * total) / pieces);
    for (const { from, to } of intervals) {
      if (start < to - from) {
        stretches.push({ from: from + start, to: Math.min(to, from + start + size) });
        break;
      }
      start -= to - from;
    }
  }
  return stretches;
}

import type { TargetFigures } from '../evaluation/targetTally';
import { integerFormat, type TargetFilter } from '../numbers/targetFilter';
import { clamp, roundHalfUp, type WordRange, wordRange } from '../numbers/words';
import { accumulatorBound, worstCase } from '../numbers/worstCase';
import type { ArithmeticResult } from './designResult';
import type { Pairing } from './pairing';

/** The target filter and its figures as the written files show them. */
export function arithmeticResult(
  target: TargetFilter,
  figures: TargetFigures,
  pairing: Pairing,
): ArithmeticResult {
  const format = integerFormat(target);
  return {
    values: target.values,
    fractionBits: format?.fractionBits ?? null,
    ...target.scaling,
    worstCase: format === null ? null : worstCase(target.values, format),
    recordedCase:
      format === null ? null : accumulatorBound(target.values, format, recordedRanges(pairing, target)),
    heldOutNmseDb: figures.nmseDb,
    quantisationLossDb: figures.quantisationLossDb,
    outputErrorDb: figures.outputErrorDb,
    accumulatorOverflows: figures.accumulatorOverflows,
    outputOverflows: figures.outputOverflows,
    samples: figures.samples,
  };
}

/** What each input of the filter keeps to in the recordings of all takes, in counts, means taken off. */
function recordedRanges({ takes, recordings }: Pairing, target: TargetFilter): WordRange[] {
  const format = integerFormat(target);
  const word = wordRange(format?.inputWord ?? 16);
  return takes[0].inputs.map((_, r) => {
    const q = target.scaling.inputCount[r];
    const mean = target.scaling.inputMeanCounts[r];
    const counts = (value: number) => clamp(roundHalfUp(value / q) - mean, word);
    const levels = takes.map(({ inputs }) => {
      const opened = recordings.get(inputs[r].recording.file);
      if (opened === undefined) throw new Error('a take has a recording that was not opened');
      return opened.levels[inputs[r].channel];
    });
    return {
      // The history before the first sample is zero.
      min: Math.min(0, ...levels.map(({ min }) => counts(min))),
      max: Math.max(0, ...levels.map(({ max }) => counts(max))),
    };
  });
}

import type { TargetFigures } from '../evaluation/heldOutFigures';
import { integerFormat, type TargetFilter } from '../numbers/targetFilter';
import { worstCase } from '../numbers/worstCase';
import type { ArithmeticResult } from './designResult';

/** The target filter and its figures as the written files show them. */
export function arithmeticResult(target: TargetFilter, figures: TargetFigures): ArithmeticResult {
  const format = integerFormat(target);
  return {
    values: target.values,
    fractionBits: format?.fractionBits ?? null,
    ...target.scaling,
    worstCase: format === null ? null : worstCase(target.values, format),
    heldOutNmseDb: figures.nmseDb,
    quantisationLossDb: figures.quantisationLossDb,
    outputErrorDb: figures.outputErrorDb,
    accumulatorOverflows: figures.accumulatorOverflows,
    outputOverflows: figures.outputOverflows,
    samples: figures.samples,
  };
}

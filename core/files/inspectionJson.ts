import { roundedDecibels } from '../figures/decibels';
import type { PairInspection, TakeInspection } from '../pipeline/inspectPair';
import type { CoherenceCurve } from '../suitability/pair/coherenceCurve';
import type { Json } from './jsonText';

/** What `inspect --json` says of a take, coherence by frequency included. */
export function inspectedTakeJson(take: TakeInspection): Json {
  return { ...takeJson(take), coherence: take.coherence && coherenceJson(take.coherence) };
}

/** The key `inspection` of `NAME.taps.json`: the same without the curves. */
export function inspectionJson(inspection: PairInspection | null): Json {
  if (inspection === null) return null;
  const { attainable, takes, unknownBands } = inspection;
  return {
    attainableDb: roundedDecibels(attainable.attainableDb),
    atLeastDb: roundedDecibels(attainable.atLeastDb),
    attainableReason: attainable.attainableReason,
    takes: takes.map(takeJson),
    unknownBands: unknownBands.map(({ from, to }) => ({ from: rounded(from), to: rounded(to) })),
  };
}

function takeJson(take: TakeInspection): { [key: string]: Json } {
  return {
    name: take.name,
    lagSamples: rounded(take.lagSamples),
    driftPpm: rounded(take.driftPpm),
    driftPpmStandardError: rounded(take.driftPpmStandardError),
    attainableDb: roundedDecibels(take.attainableDb),
    attainableReason: take.attainableReason,
  };
}

function coherenceJson({
  frequencies,
  values,
  significance,
  averages,
  effective,
  segment,
}: CoherenceCurve): Json {
  return {
    frequencies: Array.from(frequencies),
    values: Array.from(values, (value) => rounded(value)),
    significance: rounded(significance),
    averages,
    effectiveAverages: rounded(effective),
    segment,
  };
}

/** Six digits: estimates that no further digit of is worth anything. */
function rounded(value: number | null): number | null {
  return value === null || !Number.isFinite(value) ? null : Number(value.toPrecision(6)) + 0;
}

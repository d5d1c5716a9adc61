import type { BandFigure } from '../evaluation/bandFigures';
import { powerDecibels } from '../figures/decibels';
import { changeSentences } from '../findings/changeSentences';
import type { Finding } from '../findings/finding';
import { recordingSentences } from '../findings/recordingSentences';
import { spectraSentences } from '../findings/spectraSentences';
import { timingSentences } from '../findings/timingSentences';
import type { PairInspection } from '../pipeline/inspectPair';
import type { SpectrumView, SuitabilityView } from '../protocol/views';
import { type CrossSpectra, frequenciesOf } from '../spectra/crossSpectra';
import { coherenceInterval } from '../suitability/pair/coherence';
import type { CoherenceCurve } from '../suitability/pair/coherenceCurve';
import { findingView } from './findingView';

/** Kinds of fault that a recording by itself is searched for, and a pair. */
export const recordingChecks = Object.keys(recordingSentences).length;
export const pairChecks =
  recordingChecks +
  [timingSentences, changeSentences, spectraSentences].reduce(
    (sum, rows) => sum + Object.keys(rows).length,
    0,
  );

/**
 * @param text of the document
 * @param inspection null where a blocker came first
 * @param bands of the held-out evaluation, whose places the attainable reduction by band shares
 * @param labels of the inputs, then of the desired signal
 */
export function suitabilityView(
  findings: readonly Finding[],
  text: string,
  inspection: PairInspection | null,
  bands: readonly Pick<BandFigure, 'from' | 'to'>[],
  labels: readonly string[],
): SuitabilityView {
  return {
    findings: findings.map((found) => findingView(found, text)),
    checks: pairChecks,
    pair: inspection && {
      attainableDb: inspection.attainable.attainableDb,
      atLeastDb: inspection.attainable.atLeastDb,
      reason: inspection.attainable.attainableReason,
      bands: bands.map(({ from, to }, b) => ({
        from,
        to,
        attainableDb: inspection.attainable.bandsDb[b] ?? null,
      })),
      takes: inspection.takes.map(({ name, lagSamples, driftPpm, driftPpmStandardError, attainableDb }) => ({
        name,
        lagSamples,
        driftPpm,
        driftPpmStandardError,
        attainableDb,
      })),
      coherence: inspection.coherence && coherenceView(inspection.coherence, labels.length - 1),
      unknownBands: inspection.unknownBands.map(({ from, to }) => ({ from, to })),
      spectrum: spectrumView(inspection.spectra, labels),
    },
  };
}

function coherenceView(curve: CoherenceCurve, inputs: number) {
  const { frequencies, values, significance, averages, effective } = curve;
  const intervals = Array.from(values, (value) => coherenceInterval(value, inputs, effective));
  return {
    frequencies,
    values,
    lower: Float64Array.from(intervals, ({ from }) => from),
    upper: Float64Array.from(intervals, ({ to }) => to),
    significance,
    averages,
  };
}

/** Powers of the inputs and of the desired signal. */
function spectrumView(spectra: CrossSpectra, labels: readonly string[]): SpectrumView | null {
  if (spectra.averages === 0) return null;
  return {
    frequencies: Float64Array.from(frequenciesOf(spectra)),
    lines: labels.map((label, i) => ({
      label,
      role: i < labels.length - 1 ? 'input' : 'desired',
      valuesDb: decibelsOf(spectra.between[i][i].re),
    })),
  };
}

/** Powers in dB; NaN where there is none. */
export function decibelsOf(powers: Float64Array): Float64Array {
  return powers.map((power) => (power > 0 ? powerDecibels(power) : Number.NaN));
}

import { type CrossSpectra, effectiveAverages, frequenciesOf } from '../../spectra/crossSpectra';
import { type Band, bandsWhere, inBands } from './bands';
import { multipleCoherence, significance } from './coherence';
import type { Excitation } from './excitation';

/** Coherence by frequency as averaged, with the point that unrelated signals exceed at one frequency in twenty. */
export interface CoherenceCurve {
  /** Hz. */
  frequencies: Float64Array;
  /** Multiple coherence of the desired signal with all inputs. */
  values: Float64Array;
  significance: number;
  /** Half-overlapped Hann segments averaged; `effective` of them if they were independent. */
  averages: number;
  effective: number;
  segment: number;
}

export function coherenceCurve(spectra: CrossSpectra): CoherenceCurve {
  const effective = effectiveAverages(spectra);
  return {
    frequencies: frequenciesOf(spectra),
    values: multipleCoherence(spectra).values,
    significance: significance(spectra.signals - 1, effective),
    averages: spectra.averages,
    effective,
    segment: spectra.segment,
  };
}

/** Where a model of the path says nothing: an input is empty there, or the coherence no more than chance. */
export function unknownBands(spectra: CrossSpectra, { emptyBands }: Excitation): Band[] {
  const { values, significance: point, frequencies } = coherenceCurve(spectra);
  const unknown = values.map((value, f) => {
    const empty = emptyBands.some((bands) => inBands(bands, frequencies[f]));
    return f > 0 && (empty || value <= point) ? 1 : 0;
  });
  return bandsWhere(unknown, frequencies, 3);
}

import { type CrossSpectra, effectiveAverages } from '../../spectra/crossSpectra';
import { multipleCoherence, significance, unexplained } from './coherence';
import { levelEvidence } from './noiseByLevel';
import { sensorEvidence } from './noiseBySensors';

/** What the recordings say of noise on an input, which makes the taps of a model too small. */
export interface InputNoise {
  input: number;
  /** How: takes of different level, a second sensor, or coherence alone, which names the most that it can be. */
  by: 'levels' | 'sensors' | 'coherence';
  /** Share of the input's power that is noise; the taps are too small by it. */
  share: number;
}

/** Taps that are too small by less than this do not matter beside a model's other errors (5 %: 0.45 dB). */
const matters = 0.05;

/** A coherence below this where both signals are strong raises the question: a tenth of the taps hangs on the answer. */
const doubtful = 0.9;

/** With an attainable reduction above that of this coherence (dB) it has other reasons than noise. */
const doubtfulDb = 10;

/** Within 10 dB of its peak a signal counts as strong. */
const nearPeak = 0.1;

/**
 * For `identify`. Least squares takes the input for exact: noise of power N on an input of power S shrinks the taps by
 * `S/(S+N)` (attenuation; Bendat & Piersol, *Random Data*, ch. 6, from memory), and held-out data of the same kind
 * cannot show it. Takes of different level or a second sensor of the same quantity can; coherence alone cannot tell
 * noise on the input from noise on the output.
 * @param takes spectra by equal segments
 * @param together of all takes
 * @param attainableDb of all takes; null where it is withheld, so that a low coherence can have other reasons
 */
export function noisyInputs(
  takes: readonly CrossSpectra[],
  together: CrossSpectra,
  attainableDb: number | null,
): InputNoise[] {
  const inputs = together.signals - 1;
  if (inputs > 1) {
    return sensorEvidence(together)
      .filter(({ share }) => share > matters)
      .map((evidence) => ({ ...evidence, by: 'sensors' }));
  }
  const byLevel = levelEvidence(takes);
  if (byLevel !== null) return byLevel > matters ? [{ input: 0, by: 'levels', share: byLevel }] : [];
  if (attainableDb === null || attainableDb >= doubtfulDb) return [];
  const coherence = strongCoherence(together);
  if (coherence === null || coherence >= doubtful) return [];
  return [{ input: 0, by: 'coherence', share: 1 - coherence }];
}

/**
 * Coherence where both signals are strong, weighted by the power of the desired one and freed of the bias of few
 * averages; null where nothing there is significant. For one input.
 */
function strongCoherence(spectra: CrossSpectra): number | null {
  const averages = effectiveAverages(spectra);
  const [input, desired] = [0, 1].map((s) => spectra.between[s][s].re);
  const [strongInput, strongDesired] = [input, desired].map((power) => nearPeak * peakOf(power));
  const { values } = multipleCoherence(spectra);
  const point = significance(1, averages);
  let left = 0;
  let weight = 0;
  let significant = 0;
  for (let f = 1; f < input.length; f++) {
    if (input[f] < strongInput || desired[f] < strongDesired) continue;
    weight += desired[f];
    left += desired[f] * Math.min(1, unexplained(values[f], 1, averages));
    if (values[f] > point) significant += desired[f];
  }
  return significant > 0.5 * weight ? 1 - left / weight : null;
}

/** Of the bins above 0 Hz. */
function peakOf(power: Float64Array): number {
  return power.reduce((most, value, f) => (f === 0 ? most : Math.max(most, value)), 0);
}

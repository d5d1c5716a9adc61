import type { Symmetry } from '../document/pairingDocument';
import type { DesignResult } from '../pipeline/designResult';
import { numberType } from './numberTypes';
import { signalWords } from './signalWords';

/** What the filter costs the target, counted as a straight loop over the taps. */
export interface FilterCost {
  /** Multiply-accumulates of a sample: one a tap, one a pair of mirrored taps. */
  macsPerSample: number;
  macsPerSecond: number;
  /** Bytes of the coefficients as stored, and of the inputs' history. */
  coefficientBytes: number;
  stateBytes: number;
  /** Bytes of the delay line, of the desired signal or of the inputs. */
  delayBytes: number;
  /** Of the multiply-accumulates alone. */
  cyclesPerSample: number;
  cyclesPerSecond: number;
}

export function filterCost(result: DesignResult): FilterCost {
  const { document, inputs, sampleRate } = result;
  const { length, delay, symmetry } = document.filter;
  const { word, cyclesPerMac } = document.arithmetic;
  const words = signalWords(document);
  const macs = macsPerSample(inputs.length, length, symmetry);
  const lag = document.job === 'predict' ? 0 : Math.max(0, -delay);
  const ahead = document.job === 'cancel' ? Math.max(0, delay) : 0;
  const inputBytes = numberType(words.input).bytes;
  return {
    macsPerSample: macs,
    macsPerSecond: macs * sampleRate,
    coefficientBytes: length * inputs.length * numberType(word).bytes,
    stateBytes: length * inputs.length * inputBytes,
    delayBytes: lag * inputs.length * inputBytes + ahead * numberType(words.output).bytes,
    cyclesPerSample: macs * cyclesPerMac,
    cyclesPerSecond: macs * cyclesPerMac * sampleRate,
  };
}

/**
 * Multiply-accumulates of a sample. Mirrored taps share a multiplication; the middle one of antisymmetric taps is 0.
 * @param inputs K
 * @param length M
 */
export function macsPerSample(inputs: number, length: number, symmetry: Symmetry): number {
  if (symmetry === 'none') return inputs * length;
  return inputs * (symmetry === 'even' ? (length + 1) >> 1 : length >> 1);
}

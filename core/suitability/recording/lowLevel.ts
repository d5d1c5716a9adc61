import { type Finding, finding } from '../../findings/finding';
import type { ChannelCheck, ChannelFacts } from './check';
import type { Resolution } from './resolution';

/**
 * Of 63 steps or fewer the rounding (a twelfth of a squared step) is no more than 38 dB below a sine that fills them, and
 * 28 dB below noise whose rms is an eighth of them: what a good filter leaves, so that the converter would set the result.
 */
const fewestBits = 7;

/** Amplitude 1 in the steps of the finest fixed-point format, 32 bits. */
const finest = 2147483648;

/** A signal of levels keeps still more often than not, and then moves by more than one step. */
const keptLevels = 0.5;
const levelStep = 2;

/** A signal of two or three values is made of levels. */
const fewestValues = 4;

/**
 * Low level: how many steps of its resolution a fixed-point signal or one of whole numbers uses. Signals of two or
 * three values, or of a few that are held, are made of levels.
 */
export function newLowLevel(pcm: boolean, bits: number | null, resolution: Resolution): ChannelCheck {
  let used = 0;
  const lowest = bits === null ? 0 : 1 << (32 - bits);
  const values: number[] = [];
  return {
    add(samples) {
      if (!pcm) return collect(values, samples);
      // Once the lowest bit that the format has is in use there is nothing more to find.
      if (bits !== null && (used & lowest) !== 0) return;
      let all = used;
      for (let k = 0; k < samples.length; k++) all |= samples[k] * finest;
      used = all;
    },
    findings(facts) {
      const { min, max, whole } = facts.levels;
      // A-law and µ-law keep their precision at low levels.
      if (min === max || (pcm ? bits === null : !whole)) return [];
      const step = pcm ? lowestBit(used) / finest : 1;
      const steps = Math.round((max - min) / step);
      if ((!pcm && values.length < fewestValues) || bitsFor(steps) >= fewestBits) return [];
      const { pairs, equalPairs, moved } = resolution;
      const ofLevels = equalPairs > keptLevels * pairs && moved > levelStep * step * (pairs - equalPairs);
      return ofLevels ? [] : [report(steps, pcm ? bits : null, facts)];
    },
  };
}

/** Adds the values that are new, until it is known that there are enough. */
function collect(values: number[], samples: Float64Array): void {
  let last = Number.NaN;
  for (let k = 0; k < samples.length && values.length < fewestValues; k++) {
    const value = samples[k];
    if (value === last) continue;
    last = value;
    if (!values.includes(value)) values.push(value);
  }
}

/** The value of the lowest bit set, 2^31 where none is. */
function lowestBit(bits: number): number {
  return bits === 0 ? finest : (bits & -bits) >>> 0;
}

/** Bits that number `steps + 1` values. */
function bitsFor(steps: number): number {
  let bits = 0;
  for (let values = 1; values < steps + 1; values *= 2) bits++;
  return bits;
}

function report(steps: number, of: number | null, { place }: ChannelFacts): Finding {
  const bits = `${bitsFor(steps)} bits${of === null ? '' : ` of ${of}`}`;
  return finding('low-level', { steps, bits, fewest: fewestBits }, place);
}

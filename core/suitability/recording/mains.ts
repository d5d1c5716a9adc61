import { fixed } from '../../figures/numbers';
import { frequency } from '../../figures/units';
import { type Finding, finding } from '../../findings/finding';
import { newWelch } from '../../spectra/welch';
import type { ChannelFacts, RecordingCheck } from './check';
import { mainsFrequencies, mainsLines } from './mainsLines';

/** Hz between bins at most: 50 Hz then has 33 bins below it, and a line is told from a broad resonance. */
const coarsest = 1.5;

/** Segments that are enough to know the floor within 15 %, so that long recordings are looked at in stretches. */
const stretches = 48;

/** Fewer averages cannot tell a line from chance. */
const fewestAverages = 4;

/** Longest segment: rates above 390 kHz are not looked at. */
const longestSegment = 262144;

/** Channels looked at, so that the segments held stay below 100 MiB at any usual rate. */
const mostChannels = 64;

/**
 * Lines of the mains by Welch's method (Hann window, half overlap, segments of at least 0.67 s, the next power of two).
 * A recording of more than 48 segments is looked at in 48 of them, evenly spread. Nothing is found where the rate is not
 * known or fewer than four segments fit. Samples that are no numbers count as the one before.
 */
export function newMains(count: number, samples: number, sampleRate: number | null): RecordingCheck {
  const segment = segmentFor(sampleRate ?? 0);
  if (sampleRate === null || samples < 2 * segment || segment > longestSegment) {
    return { add: () => {}, findings: () => [] };
  }
  const looked = Math.min(count, mostChannels);
  const welch = newWelch(looked, segment, sampleRate);
  const spread = samples > stretches * segment;
  const length = spread ? segment : samples;
  const startOf = (s: number) => (spread ? Math.floor((s * (samples - segment)) / (stretches - 1)) : 0);
  let current = 0;

  return {
    add(channels, from) {
      const to = from + channels[0].length;
      while (current < (spread ? stretches : 1)) {
        const start = startOf(current);
        const end = start + length;
        if (start >= to) return;
        const begin = Math.max(start, from) - from;
        const stop = Math.min(end, to) - from;
        welch.push(channels.slice(0, looked).map((plane) => mended(plane.subarray(begin, stop))));
        if (end > to) return;
        welch.gap();
        current++;
      }
    },
    findings(facts) {
      if (welch.averages < fewestAverages) return [];
      const spacing = sampleRate / segment;
      return welch.densities().flatMap((density, c) => report(density, spacing, facts[c]));
    },
  };
}

function segmentFor(sampleRate: number): number {
  let segment = 64;
  while (segment * coarsest < sampleRate) segment *= 2;
  return segment;
}

/** The same samples where all are numbers, otherwise a copy in which the others repeat the one before. */
function mended(samples: Float64Array): Float64Array {
  let sum = 0;
  for (let k = 0; k < samples.length; k++) sum += samples[k] - samples[k];
  if (sum === 0) return samples;
  let last = 0;
  return samples.map((value) => {
    if (value - value === 0) last = value;
    return last;
  });
}

function report(density: Float64Array, spacing: number, { place }: ChannelFacts): Finding[] {
  return mainsFrequencies.flatMap((mains) => {
    const lines = mainsLines(density, spacing, mains);
    if (lines.length === 0) return [];
    const shown = lines.map(
      (line) => `${frequency(nominal(line.frequency, mains))} ${fixed(line.above, 1)} dB`,
    );
    const values = { mains, lines: shown.join(', '), highest: Math.max(...lines.map(({ above }) => above)) };
    return [finding('mains', values, place)];
  });
}

/** The multiple of the mains frequency that a line is nearest to. */
function nominal(frequency: number, mains: number): number {
  return mains * Math.round(frequency / mains);
}

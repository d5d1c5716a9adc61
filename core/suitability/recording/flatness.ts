import type { ChannelCheck } from './check';
import { newClipped } from './clipped';
import { newFlatRuns } from './flatRuns';
import type { Resolution } from './resolution';
import { newStuck } from './stuck';
import { newTopValues } from './topValues';

/** Clipped, stuck and dropped-out stretches: all rest on runs of equal samples, which are sought once. */
export function newFlatness(resolution: Resolution, sampleRate: number | null): ChannelCheck {
  /** The largest values, and the largest negatives. */
  const top = newTopValues();
  const bottom = newTopValues();
  const clipped = newClipped(resolution, top, bottom);
  const stuck = newStuck(sampleRate);
  const runs = newFlatRuns({ run: clipped.run, longRun: stuck.longRun });
  let last = Number.NaN;

  function countEnds(samples: Float64Array, from: number): void {
    let most = top.least;
    let least = -bottom.least;
    let stays = 0;
    for (let k = 0; k < samples.length; k++) {
      const value = samples[k];
      if (value < most && value > least) continue;
      if (value === (k === 0 ? last : samples[k - 1])) {
        stays++;
        continue;
      }
      top.stay(stays);
      bottom.stay(stays);
      stays = 0;
      top.arrive(value, from + k);
      bottom.arrive(-value, from + k);
      most = top.least;
      least = -bottom.least;
    }
    top.stay(stays);
    bottom.stay(stays);
    last = samples[samples.length - 1];
  }

  return {
    add(samples, from) {
      countEnds(samples, from);
      runs.add(samples, from);
    },
    findings(facts) {
      runs.end();
      return [...clipped.findings(facts, stuck.isApart), ...stuck.findings(facts)];
    },
  };
}

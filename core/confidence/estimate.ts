import type { Filter } from '../evaluation/filter';
import type { GainConditions } from '../solvers/fixedGain';
import type { Fold } from '../solvers/fold';
import type { NormalSystem } from '../solvers/normalSystem';

/** Taps that were fitted, and all that is needed of how. */
export interface Estimate {
  filter: Filter;
  fold: Fold;
  /** Conditions on the free taps of one input (from 0); null where there are none. */
  gain: { conditions: GainConditions; input: number } | null;
  /** Normal equations of all taps, and of the free ones. */
  whole: NormalSystem;
  system: NormalSystem;
  /** ρ */
  regularisation: number;
}

/** How many unknowns the data had to tell. */
export function unknownsOf({ system, gain }: Estimate): number {
  return system.size - (gain?.conditions.columns.length ?? 0);
}

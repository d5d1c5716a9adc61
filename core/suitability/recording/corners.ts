import type { FlatRun } from './flatRuns';

/**
 * A smooth peak that stays within one step for a run falls by (1 + 2k/(length-1))² steps in the k samples after it; four
 * times as much is a corner. A signal that settles comes in with steps that shrink by eight or more from one to the next,
 * or ends within four steps; the two steps before those that a limit cuts are about alike.
 */
const corner = 4;
const shrinking = 8;

/** Steps over which a ramp that is led to a level is straight, within so many steps of the resolution. */
const rampSteps = 7;
const straight = 3;

/** The sample so many before a run (-1 the nearest) or after it (1 the nearest); NaN where it is not known. */
export type Beside = (offset: number) => number;

/**
 * Whether the signal comes into the run and leaves it at full slope, and not along a ramp.
 * @param length 3 or more
 * @param step between neighbouring values near the run's
 */
export function hasCorners(run: FlatRun, beside: Beside, step: number): boolean {
  return isCorner(run, beside, -1, step) && isCorner(run, beside, 1, step) && !isRamp(beside, step);
}

/**
 * By the step next to the run, which the limit cuts to any part of itself, or by the two next to it.
 * @param side -1 before the run, 1 after it
 */
function isCorner({ value, length }: FlatRun, beside: Beside, side: number, step: number): boolean {
  const near = Math.abs(beside(side) - value);
  const far = Math.abs(beside(2 * side) - beside(side));
  if (near + far <= corner * step) return false;
  const farthest = Math.abs(beside(3 * side) - beside(2 * side));
  // Not so where a sample is not known.
  const atSlope = 2 * farthest >= far && 2 * far >= farthest;
  if (atSlope && near + far > fall(2, length, step)) return true;
  return near > fall(1, length, step) && (atSlope || !(shrinking * near < far));
}

/** How far the signal is below a smooth peak of this length at most, so many samples beside it. */
function fall(samples: number, length: number, step: number): number {
  const widening = 1 + (2 * samples) / (length - 1);
  return corner * widening * widening * step;
}

/** Ramps are made; what a limit cuts off has a bend of its own. */
function isRamp(beside: Beside, step: number): boolean {
  const bend = beside(-1) - 2 * beside(-1 - rampSteps) + beside(-1 - 2 * rampSteps);
  return Math.abs(bend) <= straight * step;
}

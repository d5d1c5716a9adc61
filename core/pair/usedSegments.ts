import { complement, type Interval, intersect } from './intervals';
import { inputSamples, type Take } from './take';

/**
 * The n of the wanted intervals that may be used: every x[n-k] (0 ≤ k < length) and d[n-delay] exists in the
 * recording, and none of them lies in a gap between two listed (fit or held-out) intervals of the take.
 * What lies before the first and after the last listed interval serves as history.
 * @param wanted intervals of the take, sorted
 * @param length filter length M
 * @param delay Δ in samples
 * @param history samples before all of these that must exist as well, of every signal: what a band filter looks back on
 * @returns sorted runs of n, none empty
 */
export function usedSegments(
  take: Take,
  wanted: readonly Interval[],
  length: number,
  delay: number,
  history = 0,
): Interval[] {
  const listed = [...take.fit, ...take.heldOut].sort((a, b) => a.from - b.from);
  const end = Math.max(inputSamples(take), take.desired.recording.samples);
  const outside = complement(listed, end);
  const gaps = outside.filter((gap) => gap.from > listed[0].from && gap.to < listed[listed.length - 1].to);
  const inputRuns = intersect(complement(gaps, end), [{ from: 0, to: inputSamples(take) }]);
  const desiredRuns = intersect(complement(gaps, end), [{ from: 0, to: take.desired.recording.samples }]);
  const withInput = inputRuns
    .map(({ from, to }) => ({ from: from + length - 1 + history, to }))
    .filter(({ from, to }) => to > from);
  const withDesired = desiredRuns
    .map(({ from, to }) => ({ from: from + delay + history, to: to + delay }))
    .filter(({ from, to }) => to > from);
  return intersect(intersect(wanted, withInput), withDesired);
}

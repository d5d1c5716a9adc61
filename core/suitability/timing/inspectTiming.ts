import type { PairingDocument } from '../../document/pairingDocument';
import type { Finding } from '../../findings/finding';
import type { Pace } from '../../pace';
import type { Means } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { align } from './alignment';
import { acausality } from './causality';
import { lagCourse } from './drift';
import { constantLag } from './lag';
import { acausalFinding, driftFinding, type InputTiming, lagFinding } from './timingFindings';

export interface TakeTiming {
  name: string;
  /** By how many samples the desired signal follows the input of the clearest lag; null where none stands out. */
  lagSamples: number | null;
  /**
   * Clock difference in parts in a million, positive where the desired signal's clock is the faster; null where one
   * clock took both signals or the lag's course cannot be told.
   */
  driftPpm: number | null;
  driftPpmStandardError: number | null;
}

/**
 * Lag, drift and causality. Reads some tens of windows of each take's fit intervals, however long they are. Nothing
 * is said for `predict`, whose horizon is chosen and not found.
 * @param means as the fit takes them off
 * @throws Refusal `not-finite-used` where a window holds NaN or infinite samples
 */
export async function inspectTiming(
  takes: readonly Take[],
  document: PairingDocument,
  means: Means,
  pace: Pace,
): Promise<{ takes: TakeTiming[]; findings: Finding[] }> {
  const figures: TakeTiming[] = [];
  const findings: Finding[] = [];
  const aligned: Take[] = [];
  for (const [t, take] of takes.entries()) {
    const timings = document.job === 'predict' ? [] : await timingsOf(take, means, pace);
    const clearest = clearestOf(timings);
    const drifting = clearestOf(timings.filter((timing) => timing.drift !== null));
    figures.push({
      name: take.name,
      lagSamples: clearest?.lag.samples ?? null,
      driftPpm: drifting?.drift?.ppm ?? null,
      driftPpmStandardError: drifting?.drift?.standardError ?? null,
    });
    const lag = clearest && lagFinding(take, document, clearest);
    const drift = drifting && driftFinding(take, t, drifting);
    if (lag !== null) findings.push(lag);
    if (drift !== null) findings.push(drift);
    // A lag out of reach comes first; what lies before the first tap is its doing.
    if (lag?.severity !== 'caution') aligned.push(take);
  }
  if (document.job !== 'predict' && aligned.length > 0) {
    const found = await acausality(aligned, document, means, pace);
    if (found !== null) findings.push(acausalFinding(document, found));
  }
  return { takes: figures, findings };
}

/** Of every input whose lag stands out. */
async function timingsOf(take: Take, means: Means, pace: Pace): Promise<InputTiming[]> {
  const timings: InputTiming[] = [];
  if (take.fit.length === 0) return timings;
  for (const [input, track] of take.inputs.entries()) {
    const { recording, channel } = take.desired;
    if (track.recording.file === recording.file && track.channel === channel) continue;
    const one: Take = { ...take, inputs: [track] };
    const ownMeans: Means = { inputs: [means.inputs[input]], desired: means.desired };
    const twoClocks = track.recording.file !== recording.file;
    const alignment = await align(one, ownMeans, twoClocks, pace);
    if (alignment === null) continue;
    const drift = twoClocks ? await lagCourse(one, ownMeans, alignment, pace) : null;
    const lag = drift?.lag ?? (await constantLag(one, ownMeans, { ...alignment, slope: 0 }, pace));
    if (lag !== null) timings.push({ input, twoClocks, lag, drift });
  }
  return timings;
}

function clearestOf(timings: readonly InputTiming[]): InputTiming | null {
  return timings.reduce<InputTiming | null>(
    (best, timing) => (best === null || timing.lag.height > best.lag.height ? timing : best),
    null,
  );
}

import { hasBareFit } from '../evaluation/measuredRuns';
import type { DesignResult } from './designResult';

/** Why the reduction that the coherence allows says nothing about the held-out figures. */
export type LimitDiffers = 'band' | 'wanted signal';

/**
 * Whether the limit by the coherence of the fit data is of the same kind as the held-out figures: it knows no weighting to
 * a band, and for `cancel` the wanted signal may be in the fit data and not in what is held out. Null where it is.
 */
export function limitDiffers({
  document,
  heldOut,
  takes,
}: Pick<DesignResult, 'document' | 'heldOut' | 'takes'>): LimitDiffers | null {
  if (document.prepare.band !== null) return 'band';
  if (document.job !== 'cancel' || !heldOut?.disturbanceOnly) return null;
  return takes.some(hasBareFit) ? null : 'wanted signal';
}

/** The most that a linear filter of any length could take off the held-out data, in dB; null where that is not known. */
export function comparableLimit(result: DesignResult): number | null {
  return limitDiffers(result) === null ? (result.inspection?.attainable.attainableDb ?? null) : null;
}

/** The same by band of the held-out figures; each band has its own whatever the weighting. */
export function comparableBands(result: DesignResult): (number | null)[] {
  return limitDiffers(result) === 'wanted signal' ? [] : (result.inspection?.attainable.bandsDb ?? []);
}

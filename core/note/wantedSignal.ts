import { bareFit } from '../evaluation/measuredRuns';
import { totalLength } from '../pair/intervals';
import type { DesignResult, TakeSummary } from '../pipeline/designResult';

/** True where the wanted signal is in the figures of held-out data and hides the disturbance. */
export function wantedSignalHides({ document, heldOut }: DesignResult): boolean {
  return document.job === 'cancel' && (heldOut === null || !heldOut.disturbanceOnly);
}

/** True where the wanted signal may be in the fit intervals, so that fit and held-out figures cannot be compared. */
export function wantedSignalInFit({ document, takes }: DesignResult): boolean {
  const bare = (take: TakeSummary) => totalLength(bareFit(take)) === totalLength(take.fit);
  return document.job === 'cancel' && !takes.every(bare);
}

/** The caution in full; empty where the wanted signal hides nothing. */
export function wantedSignalCaution(result: DesignResult): string {
  return wantedSignalHides(result)
    ? '**Caution:** no held-out `disturbanceOnly` interval is named, so the wanted signal counts as error and hides the disturbance. These figures do not measure how far the disturbance is reduced, and limits on them count as not tested.'
    : '';
}

/** The caution in short, for every further place that shows such figures. */
export function wantedSignalReminder(result: DesignResult): string {
  return wantedSignalHides(result)
    ? '**Caution:** the wanted signal counts as error in these figures and hides the disturbance (see Verdict).'
    : '';
}

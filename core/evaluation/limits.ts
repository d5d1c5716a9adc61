import type { PairingDocument } from '../document/pairingDocument';
import { decibels } from '../figures/decibels';
import { type Finding, finding } from '../findings/finding';
import type { TakeFigure } from './heldOutFigures';
import type { TargetFigures } from './targetTally';

/** What the limits are held against. */
export interface LimitedFigures {
  /** Null where nothing was held out. */
  takes: TakeFigure[] | null;
  /** Null where nothing was held out. */
  target: TargetFigures | null;
  /** False where the wanted signal counts as error. */
  trustworthy: boolean;
}

/** The document's limits: `over-limit` for the worst take, `limit-not-tested` where there is nothing to hold against. */
export function checkLimits(limits: PairingDocument['limits'], figures: LimitedFigures): Finding[] {
  const { takes, target, trustworthy } = figures;
  const findings: Finding[] = [];
  const untested = (what: string, key: string) => {
    const why =
      takes === null
        ? 'nothing was held out'
        : 'the wanted signal counts as error, without a disturbance-only stretch';
    findings.push(finding('limit-not-tested', { what, why }, { path: ['limits', key] }));
  };
  const over = (what: string, key: string, value: number, limit: number, take?: string) => {
    // Compared as shown, so that a figure that reads equal to its limit is within it.
    if (Number(value.toFixed(2)) <= limit) return;
    const where = take === undefined ? '' : ` (take ${take})`;
    findings.push(
      finding(
        'over-limit',
        { what, value: decibels(value).replace(' dB', ''), limit, where },
        { path: ['limits', key] },
      ),
    );
  };
  if (limits.heldOutNmse !== null) {
    if (takes === null || !trustworthy) untested('the held-out NMSE', 'heldOutNmse');
    else {
      const worst = takes.reduce((a, b) => (b.nmseDb > a.nmseDb ? b : a));
      over(
        'the held-out NMSE',
        'heldOutNmse',
        worst.nmseDb,
        limits.heldOutNmse,
        takes.length > 1 ? worst.name : undefined,
      );
    }
  }
  if (limits.quantisationLoss !== null) {
    if (target === null || !trustworthy) untested('the quantisation loss', 'quantisationLoss');
    else
      over('the quantisation loss', 'quantisationLoss', target.quantisationLossDb, limits.quantisationLoss);
  }
  return findings;
}

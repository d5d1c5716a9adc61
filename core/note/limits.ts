import type { DesignResult, TakeFigure } from '../pipeline/designResult';

/** A figure against the limit that the document sets for it. */
export interface LimitCheck {
  what: 'heldOutNmse' | 'quantisationLoss';
  /** dB; null where there is no such figure. */
  figure: number | null;
  /** dB; null where the document sets none. */
  limit: number | null;
  state: 'met' | 'exceeded' | 'not tested' | 'no limit';
}

/** The take with the highest held-out NMSE, to which limits apply; null where nothing is held out. */
export function worstTake({ heldOut }: DesignResult): TakeFigure | null {
  if (heldOut === null || heldOut.takes.length === 0) return null;
  return heldOut.takes.reduce((worst, take) => (take.nmseDb > worst.nmseDb ? take : worst));
}

/** Every figure that can have a limit, and whether it keeps it: the design's findings decide. */
export function limitChecks(result: DesignResult): LimitCheck[] {
  const check = (what: LimitCheck['what'], figure: number | null): LimitCheck => {
    const limit = result.document.limits[what];
    return { what, figure, limit, state: limit === null ? 'no limit' : state(result, what) };
  };
  return [
    check('heldOutNmse', worstTake(result)?.nmseDb ?? null),
    check('quantisationLoss', result.arithmetic.quantisationLossDb),
  ];
}

function state({ findings }: DesignResult, what: LimitCheck['what']): LimitCheck['state'] {
  const found = (code: 'over-limit' | 'limit-not-tested') =>
    findings.some((f) => f.code === code && f.path?.[1] === what);
  if (found('over-limit')) return 'exceeded';
  return found('limit-not-tested') ? 'not tested' : 'met';
}

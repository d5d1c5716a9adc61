import { mostForErrors, toldFromZero } from '../confidence/tapErrors';
import { counted, significant } from '../figures/numbers';
import type { DesignResult } from '../pipeline/designResult';

/** Why there are no standard errors. */
export const withheldReasons = {
  'too-many-taps': `there are more than ${mostForErrors} taps in all`,
  'too-few-samples': 'there are fewer than two samples for each tap',
  'not-invertible': 'the normal matrix could not be inverted',
} as const;

/** Behind a tap that cannot be told from zero. */
export const untold = '†';

/** What the standard errors are, or why there are none. */
export function errorsInWords({ confidence, coefficients }: DesignResult): string {
  const { errors, window } = confidence;
  if ('withheld' in errors)
    return `Standard errors of the taps are not given: ${withheldReasons[errors.withheld]}.`;
  const taps = coefficients.flatMap((row, r) =>
    Array.from(row, (w, k) => toldFromZero(w, errors.standardErrors[r][k])),
  );
  const few = taps.filter((told) => !told).length;
  return `The standard errors are those of a residual that is coloured but independent of the inputs (sandwich estimate, its correlation over ${counted(window, 'lag')}), about where regularisation and a finite length leave the taps. ${
    few === 0
      ? 'Every tap can be told from zero (95 %).'
      : `${counted(few, 'tap')} of ${taps.length} cannot be told from zero (95 %), marked ${untold} in the table.`
  }`;
}

/** One tap with its mark, and its standard error; null for the error where there is none. */
export function tapWithError(
  { coefficients, confidence: { errors } }: DesignResult,
  r: number,
  k: number,
): { tap: string; error: string | null } {
  const w = coefficients[r][k];
  if ('withheld' in errors) return { tap: significant(w, 6), error: null };
  const error = errors.standardErrors[r]?.[k] ?? 0;
  return {
    tap: `${significant(w, 6)}${toldFromZero(w, error) ? '' : ` ${untold}`}`,
    error: significant(error, 2),
  };
}

import { decibels } from '../../core/figures/decibels';
import { significant } from '../../core/figures/numbers';
import { visible } from '../../core/figures/visible';
import type { PairInspection } from '../../core/pipeline/inspectPair';

/** What the inspection of a pair found, a line a take, for a terminal. */
export function pairText({ takes, attainable }: PairInspection): string[] {
  const lines = takes.map(({ name, lagSamples, driftPpm, driftPpmStandardError, attainableDb }) => {
    const parts = [
      lagSamples === null ? 'no one lag stands out' : `lag ${significant(lagSamples, 3)} samples`,
      ...(driftPpm === null
        ? []
        : [`clocks differ by ${significant(driftPpm, 3)} ± ${significant(driftPpmStandardError, 2)} ppm`]),
      ...(attainableDb === null ? [] : [`attainable reduction ${decibels(attainableDb)}`]),
    ];
    return `  ${visible(name)}: ${parts.join(', ')}`;
  });
  const { attainableDb, atLeastDb, attainableReason } = attainable;
  const least = atLeastDb === null ? '' : `; at least ${decibels(atLeastDb)}`;
  const together =
    attainableDb === null
      ? `attainable reduction not shown: ${attainableReason ?? 'it cannot be told'}${least}`
      : `attainable reduction ${decibels(attainableDb)}`;
  return ['pair', ...lines, `  all takes: ${together}`];
}

import { powerDecibels } from '../figures/decibels';
import { fixed, significant } from '../figures/numbers';
import { type Finding, finding } from '../findings/finding';
import type { ExtraLags } from './extraLags';
import type { ResidualTests } from './residuals';

/** Probability below which chance is ruled out, for all inputs of a side together. */
const level = 0.01;

/** dB; less is within the standard error of most held-out figures and not worth the taps (common practice). */
const smallestGain = 0.2;

/** dB from which it is a caution: as much as engineers let a figure differ without asking (common practice). */
const cautionGain = 0.5;

/**
 * `taps-missing` and `delay-missing`: the input for which most would be gained, where chance is ruled out.
 * @param inputs labels
 * @param length M
 */
export function residualFindings(
  { extra }: ResidualTests,
  inputs: readonly string[],
  length: number,
): Finding[] {
  return (['after', 'before'] as const).flatMap((side) => {
    const telling = (extra ?? []).filter(
      (lags) =>
        lags.side === side && lags.probability * inputs.length < level && gainDb(lags) >= smallestGain,
    );
    if (telling.length === 0) return [];
    const most = telling.reduce((a, b) => (b.share > a.share ? b : a));
    const { lags, probability, input } = most;
    const gain = gainDb(most);
    return [
      finding(
        side === 'after' ? 'taps-missing' : 'delay-missing',
        {
          from: length,
          to: length + lags - 1,
          lags,
          gain: fixed(gain, 2),
          probability: probability < 1e-6 ? 'below 1e-6' : significant(probability, 2),
        },
        { channel: inputs[input], path: ['filter', side === 'after' ? 'length' : 'delay'] },
        gain >= cautionGain ? 'caution' : 'note',
      ),
    ];
  });
}

/** By how much the residual would fall. */
export function gainDb({ share }: ExtraLags): number {
  return -powerDecibels(Math.max(1e-12, 1 - share));
}

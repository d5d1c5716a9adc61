import { significant } from '../../figures/numbers';
import { type Finding, finding } from '../../findings/finding';
import type { ChannelFacts } from './check';

/**
 * From here on four fifths of the power is the mean's: powers, the regularisation (relative to the power) and levels speak
 * of the offset rather than of the signal.
 */
const large = 2;

/** A mean that is large against what varies. A constant signal has none to be compared with. */
export function checkOffset({ levels, place }: ChannelFacts): Finding[] {
  const { mean, rms, min, max } = levels;
  if (min === max) return [];
  const varying = Math.sqrt(Math.max(0, rms * rms - mean * mean));
  // Nor is there any where squares are beyond all doubles.
  if (!(varying > 0 && Math.abs(mean) > large * varying)) return [];
  const values = {
    mean: significant(mean),
    varying: significant(varying),
    ratio: significant(Math.abs(mean) / varying, 2),
  };
  return [finding('offset', values, place)];
}

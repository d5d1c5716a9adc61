import { type Finding, finding } from '../../findings/finding';
import type { ChannelFacts } from './check';

/** Samples that are NaN or infinite; those that the fit would use stop the design where it meets them. */
export function checkNotFinite({ levels, place }: ChannelFacts): Finding[] {
  if (levels.notFinite === null) return [];
  const { count, first } = levels.notFinite;
  return [finding('not-finite', { count, first }, { ...place, from: first })];
}

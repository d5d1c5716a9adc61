import type { Job, PairingDocument } from '../document/pairingDocument';
import { hasBareFit } from '../evaluation/measuredRuns';
import { type Finding, finding } from '../findings/finding';
import type { Take } from '../pair/take';
import type { Grid } from './grid';
import type { Suggestion } from './suggest';

/**
 * Where the suggestion stands at the end of what was tried.
 * @param delayKept whether the delay was not free to choose
 */
export function edgeFindings(
  { lengths, delays }: Grid,
  { chosen }: Suggestion,
  delayKept: boolean,
): Finding[] {
  const findings: Finding[] = [];
  if (lengths.length > 1 && chosen.length === lengths[lengths.length - 1]) {
    findings.push(finding('longest-is-best', { length: chosen.length }, { path: ['filter', 'length'] }));
  }
  const last = delays.length - 1;
  const end = chosen.delay === delays[0] ? 'smallest' : chosen.delay === delays[last] ? 'largest' : null;
  if (!delayKept && last > 0 && end !== null) {
    findings.push(finding('delay-at-the-end', { delay: chosen.delay, end }, { path: ['filter', 'delay'] }));
  }
  return findings;
}

/** Says so where the wanted signal of a canceller may be in what candidates are judged by. */
export function wantedSignalFindings(job: Job, takes: readonly Take[]): Finding[] {
  return job === 'cancel' && !takes.some(hasBareFit)
    ? [finding('choice-hidden', {}, { path: ['takes', 0] })]
    : [];
}

/** Says so where the document asks for something that the candidates leave out of account. */
export function shapeFindings({ symmetry, fixedGain, windowing }: PairingDocument['filter']): Finding[] {
  const asked = [
    symmetry !== 'none' && `"symmetry": "${symmetry}"`,
    fixedGain !== null && '"fixedGain"',
    windowing !== 'covariance' && `"windowing": "${windowing}"`,
  ].filter((what) => what !== false);
  if (asked.length === 0) return [];
  return [finding('choice-of-free-taps', { asked: asked.join(' and ') }, { path: ['filter'] })];
}

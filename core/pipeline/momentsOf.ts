import { Refusal } from '../findings/finding';
import { type Moments, measureMoments } from '../pair/moments';
import { checkPair, checkSilence } from './checkPair';
import type { Work } from './host';
import type { Pairing } from './pairing';
import { momentsKey } from './stageKeys';

/**
 * Means and powers of a pairing that bears a design.
 * @throws Refusal with all that stops one before anything is summed
 */
export async function momentsOf(pairing: Pairing, { pace, keep }: Work): Promise<Moments> {
  const { document, takes } = pairing;
  refuseIfAny(checkPair(pairing));
  const moments = await keep('moments', momentsKey(pairing), () =>
    measureMoments(takes, document.prepare.removeMean, pace),
  );
  refuseIfAny(checkSilence(takes, moments));
  return moments;
}

function refuseIfAny(findings: Refusal['findings']): void {
  if (findings.length > 0) throw new Refusal(findings);
}

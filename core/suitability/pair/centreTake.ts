import type { Pace } from '../../pace';
import type { Means } from '../../pair/signals';
import { type CrossSpectra, newCrossSpectra } from '../../spectra/crossSpectra';
import { multipleCoherence } from './coherence';
import { type AlignedTake, gatherSpectra, spreadOver } from './gatherSpectra';
import { averagesOf } from './segmentLadder';

/** Samples that show where a response is centred well enough: 60 averages of the longest segment. */
const budget = 131072;
const longest = 4096;
const shortest = 64;
const leastAverages = 8;

/**
 * Whole samples from a take's alignment to the centre of its response's energy: segments aligned there hold more of it
 * than those aligned at its first arrival. At most an eighth of a segment, which is as far as the estimate holds.
 */
export async function centreTake(aligned: AlignedTake, means: Means, pace: Pace): Promise<number> {
  const stretches = spreadOver(aligned.stretches, budget);
  let segment = longest;
  while (segment > shortest && averagesOf(stretches, segment) < leastAverages) segment /= 2;
  const gatherer = newCrossSpectra(aligned.take.inputs.length + 1, segment, 1);
  const [spectra] = await gatherSpectra({ ...aligned, stretches }, means, [gatherer], pace);
  const centre = Math.round(responseCentre(spectra));
  return Math.max(-segment / 8, Math.min(segment / 8, centre));
}

/**
 * Where the energy of the response from the inputs to the desired signal is centred, in samples after lag 0: the group
 * delay of the responses, weighted by the power they let through: `Σ -Im(Hᴴ S dH/dω) / Σ Hᴴ S H`. A difference over two
 * bins stands for the derivative, so that it holds for centres within an eighth of the segment; 0 where nothing is let
 * through.
 */
export function responseCentre(spectra: CrossSpectra): number {
  const { between, segment, signals } = spectra;
  const inputs = signals - 1;
  const { responses } = multipleCoherence(spectra);
  let turning = 0;
  let power = 0;
  for (let f = 1; f < segment / 2; f++) {
    for (let r = 0; r < inputs; r++) {
      // (S H)_r = S_xd: what the desired signal has of input r.
      const re = between[r][inputs].re[f];
      const im = between[r][inputs].im[f];
      const h = responses[r];
      power += h.re[f] * re + h.im[f] * im;
      const stepRe = 0.5 * (h.re[f + 1] - h.re[f - 1]);
      const stepIm = 0.5 * (h.im[f + 1] - h.im[f - 1]);
      // Im(conj(S_xd) ΔH)
      turning += re * stepIm - im * stepRe;
    }
  }
  const radiansPerBin = (2 * Math.PI) / segment;
  return power > 0 ? -turning / power / radiansPerBin : 0;
}

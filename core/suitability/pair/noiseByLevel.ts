import { type CrossSpectra, effectiveAverages } from '../../spectra/crossSpectra';
import { multipleCoherence, significance } from './coherence';

/** A take counts as louder from twice the amplitude on: with less, the two responses hardly differ. */
const louder = 4;

/** Standard errors by which the shrinking must stand out: one in 30,000 clean pairs would. */
const deviations = 4;

/** Bins that must tell, at least. */
const fewest = 8;

/** Neighbouring bins are related through the window: `1 + 2 ((2/3)² + (1/6)²)` for Hann's. */
const spread = 1 + 2 * (4 / 9 + 1 / 36);

/**
 * Share of noise in the quieter of two takes, from how much smaller its response is. With input powers T of two takes,
 * noise N on both and one path H, the responses are `H (1 - N/T)`; their ratio ρ (quiet to loud) gives
 * `N/T_quiet = (1-ρ) / (1 - ρ T_quiet/T_loud)`. Whether it stands out is judged with the frequencies weighted by the
 * random error of a response, `sqrt((1-γ²)/(2nγ²))` (Bendat & Piersol, from memory). The pair of takes that tells most
 * is taken. A path that changes with level does the same.
 * @returns the share; 0 where none stands out; null where no two takes differ enough in level
 */
export function levelEvidence(takes: readonly CrossSpectra[]): number | null {
  let best: Comparison | null = null;
  for (const quiet of takes) {
    for (const loud of takes) {
      const found = quiet === loud ? null : compare(quiet, loud);
      if (found !== null && (best === null || found.error < best.error)) best = found;
    }
  }
  if (best === null) return null;
  return best.evidence > deviations * best.error ? Math.max(0, Math.min(1, best.share)) : 0;
}

interface Comparison {
  /** Share of noise as weighted by what is known best, and its standard error. */
  evidence: number;
  error: number;
  /** Share of noise in the quieter take's power. */
  share: number;
}

function compare(quiet: CrossSpectra, loud: CrossSpectra): Comparison | null {
  const [q, l] = [quiet, loud].map((spectra) => {
    const averages = effectiveAverages(spectra);
    const [power, desired] = [0, 1].map((i) => spectra.between[i][i].re);
    const { values, responses } = multipleCoherence(spectra);
    const [{ re, im }] = responses;
    // |H|², less what chance adds. Takes are aligned each by itself, so that phases do not compare.
    const gains = values.map((value, f) => {
      const chance = ((1 - value) * desired[f]) / (averages * power[f]);
      return re[f] * re[f] + im[f] * im[f] - chance;
    });
    return { averages, values, gains, power };
  });
  const points = [significance(1, q.averages), significance(1, l.averages)];
  let sum = 0;
  let weight = 0;
  let noise = 0;
  let power = 0;
  let bins = 0;
  for (let f = 1; f < q.power.length - 1; f++) {
    if (l.power[f] < louder * q.power[f] || q.values[f] <= points[0] || l.values[f] <= points[1]) continue;
    if (!(q.gains[f] > 0 && l.gains[f] > 0)) continue;
    const ratio = Math.sqrt(q.gains[f] / l.gains[f]);
    const levels = q.power[f] / l.power[f];
    const share = (1 - ratio) / (1 - ratio * levels);
    const variance = randomError(q.values[f], q.averages) + randomError(l.values[f], l.averages);
    sum += share / variance;
    weight += 1 / variance;
    noise += share * q.power[f];
    power += q.power[f];
    bins++;
  }
  if (bins < fewest) return null;
  return { evidence: sum / weight, error: Math.sqrt(spread / weight), share: noise / power };
}

/** Squared relative random error of a response; never quite 0, so that no bin weighs for all. */
function randomError(coherence: number, averages: number): number {
  return (1 - coherence + 1e-6) / (2 * averages * coherence);
}

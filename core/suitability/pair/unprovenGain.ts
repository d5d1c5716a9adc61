import { powerDecibels } from '../../figures/decibels';
import { type Finding, finding } from '../../findings/finding';
import type { Take } from '../../pair/take';
import { channelLabel } from '../../recordings/recording';
import { frequencyAt, sizeFor, transformOf } from '../../statistics/transform';
import { type Band, bandsInWords, inBands } from './bands';
import type { Excitation } from './excitation';

/**
 * Gain in a band that the input left empty counts from here, relative to the largest gain elsewhere (-20 dB): what is
 * smaller adds less than a hundredth of the power once the input does reach there.
 */
const share = 0.01;

/**
 * `unproven-gain`: a filter that answers strongly where its input had no energy does so by chance; no held-out sample
 * of the same kind can show it.
 * @param coefficients one row an input, newest-first
 */
export function unprovenGain(
  coefficients: readonly Float64Array[],
  { emptyBands }: Excitation,
  sampleRate: number,
  take: Take,
): Finding[] {
  return coefficients.flatMap((row, r) => {
    const bands = emptyBands[r];
    if (bands.length === 0) return [];
    const gains = powerGains(row);
    const largest = (inside: boolean, among: readonly Band[]) => {
      let most = 0;
      gains.forEach((gain, i) => {
        const hertz = (0.5 * i * sampleRate) / (gains.length - 1);
        if (inBands(among, hertz) === inside) most = Math.max(most, gain);
      });
      return most;
    };
    const proven = largest(false, bands);
    // Empty everywhere: nothing to compare with, and `poor-excitation` says so.
    if (proven === 0) return [];
    const guilty = bands.filter((band) => largest(true, [band]) > share * proven);
    if (guilty.length === 0) return [];
    const { recording, channel } = take.inputs[r];
    return finding(
      'unproven-gain',
      {
        bands: bandsInWords(guilty),
        gain: Number(powerDecibels(largest(true, guilty) / proven).toFixed(1)),
      },
      { file: recording.file, channel: channelLabel(recording, channel) },
    );
  });
}

/** |W(f)|² at even steps from 0 Hz to half the sample rate, at least four to a lobe of the response. */
function powerGains(row: Float64Array): Float64Array {
  const size = sizeFor(8 * row.length, 1024);
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  re.set(row);
  transformOf(size).forward(re, im);
  const gains = new Float64Array(size / 2 + 1);
  for (let p = 0; p < size; p++) {
    const f = frequencyAt(p, size);
    if (f <= size / 2) gains[f] = re[p] * re[p] + im[p] * im[p];
  }
  return gains;
}

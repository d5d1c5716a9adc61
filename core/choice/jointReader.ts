import type { BandFilter } from '../pair/bandFilter';
import { bandReader } from '../pair/bandSignals';
import type { Moments } from '../pair/moments';
import { type SignalReader, signalReader } from '../pair/signals';
import type { Take } from '../pair/take';
import type { Layout } from './blockSums';

/**
 * Reads the inputs and d[n - Δ₀] as inputs. History is bounded by what the candidates need, the rest is zero: what lies
 * further back may be a gap.
 */
export function jointReader(
  take: Take,
  { inputs, length, delays }: Layout,
  moments: Moments,
  band: BandFilter | null,
): SignalReader {
  const { means } = moments;
  const passed = (read: SignalReader) => (band === null ? read : bandReader(read, band));
  const delay = delays[0];
  const span = delays[delays.length - 1] - delay;
  const read = passed(signalReader(take, { means, delay }));
  const alone = { means: { inputs: [], desired: means.desired }, delay };
  const readDesired = passed(signalReader({ ...take, inputs: [] }, alone));
  const roots = [...moments.inputPowers, moments.desiredPower].map(Math.sqrt);
  return async (from, to, history = 0) => {
    const now = await read(from, to, Math.min(history, length - 1));
    const past = history === 0 ? now : await readDesired(from - Math.min(history, span), to);
    const rows = [...now.inputs, past.desired].map((samples, r) => {
      const row = new Float64Array(to - from + history);
      const offset = row.length - samples.length;
      for (let k = 0; k < samples.length; k++) row[offset + k] = samples[k] / roots[r];
      return row;
    });
    return { inputs: rows, desired: rows[inputs].subarray(history) };
  };
}

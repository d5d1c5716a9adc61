import pairing from '../../media/bench/valve.pairing.json';
import { decimalComma, textBytes, toCounts } from './fileBytes';
import { chain, delayed, impulse, lag, lowPass, scaled, sum } from './filters';
import { randomChoices, whiteNoise } from './noise';
import { type PairingText, recordedTakes } from './pairing';
import type { Scenario } from './scenario';

export const valveRate = 1000;
const length = 16 * valveRate;
const leadIn = valveRate;

/** Current in A to flow in l/min, less the flow's offset: 10 ms of dead time, then 12 Hz, well damped. */
export const valvePath = chain(delayed(10), lowPass(12, 0.65, valveRate), scaled(24));

/** Current below which the spool does not open, in A. */
const threshold = 0.15;

/** Standard deviations of the sensors' own white noise, in A and in l/min. */
export const currentNoise = 0.0002;
export const flowNoise = 0.045;

const amperesPerCount = 0.0001;
const litresPerCount = 0.01;

/** The valve's recording and how well the true path, cut to the document's taps, foretells the flow. */
export function valveScenario(): Scenario {
  const { current, flow } = record();
  const text: PairingText = pairing;
  const channels: Record<string, Float64Array> = {
    current: current.map((counts) => counts / 10000),
    flow: flow.map((counts) => counts / 100),
  };
  const takes = recordedTakes(text, valveRate, (_, channel) => channels[channel]);
  const path = valvePath(impulse(1024));
  const { length: taps, delay } = text.filter;
  return {
    document: 'valve.pairing.json',
    files: new Map([['valve.csv', csv(current, flow)]]),
    takes,
    delay,
    heldOutLimit: text.limits.heldOutNmse,
    idealRows: [Array.from({ length: taps }, (_, k) => path[k - delay] ?? 0)],
    how: 'The true impulse response of the simulated valve, cut to the taps of the document, run over the held-out interval.',
  };
}

function record(): { current: Float64Array; flow: Float64Array } {
  const drive = lag(0.5)(steps(leadIn + length));
  const opening = drive.map((amperes) => amperes - threshold);
  const sense = (signal: Float64Array, deviation: number, seed: number, perCount: number) => {
    const noisy = sum(signal, scaled(deviation)(whiteNoise(seed, signal.length)));
    return toCounts(noisy.subarray(leadIn), perCount);
  };
  return {
    current: sense(drive, currentNoise, 2102, amperesPerCount),
    flow: sense(valvePath(opening), flowNoise, 2103, litresPerCount),
  };
}

/** A pseudo-random sequence of eleven levels from 0.3 A to 0.8 A, each held for 3 to 40 ms. */
function steps(samples: number): Float64Array {
  const level = randomChoices(2100, 11);
  const hold = randomChoices(2101, 38);
  const amperes = new Float64Array(samples);
  for (let n = 0; n < samples; ) {
    const end = Math.min(samples, n + 3 + hold());
    amperes.fill(0.3 + level() / 20, n, end);
    n = end;
  }
  return amperes;
}

/** As a logger set for continental Europe writes it: semicolons, decimal commas, a row of units, CR LF. */
function csv(current: Float64Array, flow: Float64Array): Uint8Array {
  return textBytes(
    [
      { heading: ['time', 'ms'], cells: Array.from(current, (_, n) => String(n)) },
      { heading: ['current', 'A'], cells: Array.from(current, (counts) => decimalComma(counts, 4)) },
      { heading: ['flow', 'l/min'], cells: Array.from(flow, (counts) => decimalComma(counts, 2)) },
    ],
    ';',
    '\r\n',
  );
}

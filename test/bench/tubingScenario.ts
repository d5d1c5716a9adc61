import pairing from '../../media/bench/tubing.pairing.json';
import { toCounts, wavBytes } from './fileBytes';
import { bandPass, chain, impulse, lowPass, scaled, sum } from './filters';
import { type LinearModel, wienerFilter } from './linearModel';
import { whiteNoise } from './noise';
import { type PairingText, recordedTakes } from './pairing';
import type { Scenario } from './scenario';
import { tube } from './tube';

export const tubingRate = 8000;
const length = 12 * tubingRate;
const leadIn = tubingRate / 2;

/** Standard deviation of each transducer's own white noise; full scale is 1. */
export const transducerNoise = 0.003;

const count = 1 / 32768;
/** What the transducers' zero leaves, in counts. */
const offsets = [57, -31];

/** The pressure at the port: a hum of the machine and broadband pulsation, from two white signals. */
function pressure([hum, broadband]: Float64Array[]): Float64Array {
  return sum(
    chain(bandPass(170, 4, tubingRate), scaled(0.3))(hum),
    chain(lowPass(1100, 0.6, tubingRate), scaled(0.12))(broadband),
  );
}

/** The stereo recording (behind the tubing, flush) and the best equaliser of the document's length and delay. */
export function tubingScenario(): Scenario {
  const channels = record();
  const text: PairingText = pairing;
  const takes = recordedTakes(text, tubingRate, (_, channel) =>
    channels[Number(channel) - 1].map((counts) => counts * count),
  );
  return {
    document: 'tubing.pairing.json',
    files: new Map([['tubing.wav', wavBytes(channels, tubingRate)]]),
    takes,
    delay: text.filter.delay,
    heldOutLimit: text.limits.heldOutNmse,
    idealRows: wienerFilter([{ model: model(), weight: 1 }], { inputs: 1, ...text.filter }),
    how:
      'The Wiener filter of the document (its length and delay) from the exact correlations of the simulated pressure, ' +
      'tubing and transducer noise, run over the held-out interval.',
  };
}

function record(): Float64Array[] {
  const noise = (seed: number) => whiteNoise(seed, leadIn + length);
  const flush = pressure([noise(3101), noise(3102)]);
  return [tube(flush), flush].map((signal, c) => {
    const noisy = sum(signal, scaled(transducerNoise)(noise(3103 + c)));
    return toCounts(noisy.subarray(leadIn), count).map((counts) => counts + offsets[c]);
  });
}

function model(): LinearModel {
  const one = impulse(2048);
  const none = new Float64Array(one.length);
  const sources = [pressure([one, none]), pressure([none, one])];
  const own = scaled(Math.sqrt(transducerNoise * transducerNoise + (count * count) / 12))(one);
  return {
    white: [
      ...sources.map((flush) => ({ responses: [tube(flush), flush] })),
      { responses: [own, none] },
      { responses: [none, own] },
    ],
    lines: [],
  };
}

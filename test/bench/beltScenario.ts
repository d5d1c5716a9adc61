import pairing from '../../media/bench/belt.pairing.json';
import {
  accelerometerNoise,
  beltRate,
  cellNoise,
  driveLines,
  pathOfX,
  pathOfZ,
  shakenCell,
  shakenFrame,
  shakers,
} from './beltPlant';
import { textBytes, toCounts } from './fileBytes';
import { impulse, lowPass, scaled, sum } from './filters';
import { type LinearModel, wienerFilter } from './linearModel';
import { whiteNoise } from './noise';
import { load, type Package } from './packages';
import { type PairingText, recordedTakes } from './pairing';
import { plus, responseAt, sinusoid, times } from './phasor';
import type { Scenario } from './scenario';

interface BeltTake {
  file: string;
  seed: number;
  /** m/s */
  speed: number;
  /** Strength of the vibration. */
  level: number;
  packages: Package[];
}

export const beltTakes: BeltTake[] = [
  { file: 'slow.csv', seed: 1101, speed: 0.3, level: 0.7, packages: evenly(11.5, 3, [3.2, 5.1]) },
  {
    file: 'medium.csv',
    seed: 1201,
    speed: 0.55,
    level: 1,
    packages: evenly(11.4, 1.64, [4.4, 2.7, 6.3, 3.6]),
  },
  {
    file: 'fast.csv',
    seed: 1301,
    speed: 0.85,
    level: 1.3,
    packages: [{ at: 5, mass: 4.8 }, ...evenly(11.3, 1.06, [2.9, 5.6, 4.1, 6.8, 3.3, 4.9])],
  },
];

const seconds = 24;
const leadIn = 2 * beltRate;
const countsPerKilogram = 2000;
const offsets = { x: -143, z: 9812, cell: 3127 };

/** The three recordings of the belt and the best that a filter of the document's length can do on them. */
export function beltScenario(): Scenario {
  const recordings = new Map(beltTakes.map((take) => [take.file, record(take)]));
  const text: PairingText = pairing;
  const takes = recordedTakes(text, beltRate, (file, channel) => recordings.get(file)![channel as Sensor]);
  const fitSamples = takes.map(({ fit }) => fit.reduce((total, { from, to }) => total + to - from, 0));
  const conditions = beltTakes.map((take, t) => ({ model: modelOf(take), weight: fitSamples[t] }));
  return {
    document: 'belt.pairing.json',
    files: new Map([...recordings].map(([file, columns]) => [file, csv(columns)])),
    takes,
    delay: text.filter.delay,
    heldOutLimit: text.limits.heldOutNmse,
    idealRows: wienerFilter(conditions, { inputs: 2, ...text.filter }),
    how:
      'The Wiener filter of the document (its length and delay) from the exact correlations of the simulated vibration and sensor ' +
      'noise, weighted as the fit intervals are, run over the held-out empty belt.',
  };
}

type Sensor = 'frame_x' | 'frame_z' | 'cell';

function record({ seed, speed, level, packages }: BeltTake): Record<Sensor, Float64Array> {
  const length = leadIn + seconds * beltRate;
  const noise = (source: number) => whiteNoise(seed + source, length);
  const shaken = shakenFrame(Array.from({ length: shakers }, (_, source) => noise(source)));
  const lines = driveLines(speed);
  const axis = (name: 'x' | 'z') =>
    scaled(level)(sum(shaken[name], ...lines.map((line) => sinusoid(line.turn, line[name], length))));
  const x = axis('x');
  const z = axis('z');
  const weight = lowPass(12, 0.7, beltRate)(load(shifted(packages), speed, beltRate, length));
  const sense = (signal: Float64Array, deviation: number, source: number, offset: number) => {
    const noisy = sum(signal, scaled(deviation)(noise(source)));
    return toCounts(noisy.subarray(leadIn), 1).map((counts) => counts + offset);
  };
  return {
    frame_x: sense(x, accelerometerNoise, 4, offsets.x),
    frame_z: sense(z, accelerometerNoise, 5, offsets.z),
    cell: sense(sum(shakenCell(x, z), scaled(countsPerKilogram)(weight)), cellNoise, 6, offsets.cell),
  };
}

/** Correlations of the empty belt; rounding to whole counts adds a white noise of a twelfth. */
function modelOf({ speed, level }: BeltTake): LinearModel {
  const one = impulse(4 * beltRate);
  const none = new Float64Array(one.length);
  const white = Array.from({ length: shakers }, (_, source) => {
    const { x, z } = shakenFrame(Array.from({ length: shakers }, (_, s) => (s === source ? one : none)));
    return { responses: [x, z, shakenCell(x, z)].map(scaled(level)) };
  });
  [accelerometerNoise, accelerometerNoise, cellNoise].forEach((deviation, sensor) => {
    const own = scaled(Math.sqrt(deviation * deviation + 1 / 12))(one);
    white.push({ responses: [0, 1, 2].map((s) => (s === sensor ? own : none)) });
  });
  const paths = [pathOfX(one), pathOfZ(one)];
  const lines = driveLines(speed).map(({ turn, x, z }) => {
    const [throughX, throughZ] = paths.map((path) => responseAt(turn, path));
    const gains = [x, z, plus(times(throughX, x), times(throughZ, z))];
    return { turn, gains: gains.map(({ re, im }) => ({ re: level * re, im: level * im })) };
  });
  return { white, lines };
}

function evenly(first: number, every: number, masses: number[]): Package[] {
  return masses.map((mass, i) => ({ at: first + i * every, mass }));
}

function shifted(packages: Package[]): Package[] {
  return packages.map(({ at, mass }) => ({ at: at + leadIn / beltRate, mass }));
}

function csv(columns: Record<Sensor, Float64Array>): Uint8Array {
  const text = Object.entries(columns).map(([name, counts]) => ({
    heading: [name],
    cells: Array.from(counts, String),
  }));
  return textBytes(text, ',', '\n');
}

import { powerDecibels } from '../../figures/decibels';

/** A line of the mains in a power spectral density. */
export interface MainsLine {
  /** Hz, where the line was found. */
  frequency: number;
  /** Height above the median of the density around it, in dB. */
  above: number;
}

export const mainsFrequencies = [50, 60] as const;
const harmonics = 10;

/** Large grids keep within 0.2 Hz of 50 Hz (ENTSO-E, policy 1: 200 mHz); harmonics move with the fundamental. */
const wander = 0.004;

/**
 * A density ten times the median (10 dB) comes of noise about once in 10^12 bins after four averages (chi-squared,
 * eight degrees of freedom).
 */
const standing = 10;

/** A Hann window spreads a line over two bins on either side. */
const skirt = 3;

/** A resonance is as wide as it is; a line has fallen to this part beside its skirt. */
const narrow = 1 / 6;

/** Parts of the mains frequency: where the floor is taken, and where no other line may stand that is a quarter as strong. */
const floorReach = 0.3;
const rivalReach = 0.6;
const rivalPart = 0.25;
const rivalFloorReach = 0.15;

/** The mains have no line at a part of their frequency; where there is one, both belong to something that turns. */
const mostParts = 10;
/** A line at a low frequency falls off to either side, where a slope falls to one. */
const falling = 2;

/** Lines that hold more of the power than this are the signal itself: 0.94 of a sawtooth's is in ten harmonics. */
const mostShare = 0.9;

/** Above this part of the sample rate anti-aliasing filters take away the floor. */
const usable = 0.45;

/**
 * Lines at the mains frequency and its harmonics: peaks that stand ten times above the median around them, alone, where the
 * grid's frequency may be. Without the fundamental there are none: a line at a multiple of 50 Hz alone is anything. None
 * either where they are most of the signal, or harmonics of something slower.
 * @param density in unit²/Hz, from 0 Hz
 * @param spacing of its values, in Hz
 */
export function mainsLines(density: Float64Array, spacing: number, mains: number): MainsLine[] {
  const lines = new Map<number, number>();
  for (let h = 1; h <= harmonics; h++) {
    if (h * mains > 2 * usable * spacing * (density.length - 1)) break;
    const bin = lineAt(density, (h * mains) / spacing, mains / spacing);
    if (bin !== null) lines.set(h, bin);
  }
  if (!lines.has(1) || hasPart(density, mains / spacing)) return [];
  if (shareOf(density, [...lines.values()]) > mostShare) return [];
  return [...lines.values()].map((bin) => ({
    frequency: bin * spacing,
    above: powerDecibels(density[bin] / medianAround(density, bin, (floorReach * mains) / spacing)),
  }));
}

/** The bin of the line that stands at this place, which lies between bins, or null. */
function lineAt(density: Float64Array, place: number, mains: number): number | null {
  const off = 0.5 + wander * place;
  let peak = Math.ceil(place - off) - skirt;
  for (let f = peak; f <= place + off + skirt; f++) if (density[f] > density[peak]) peak = f;
  if (Math.abs(peak - place) > off) return null;
  const floor = medianAround(density, peak, floorReach * mains);
  if (!(density[peak] > standing * floor)) return null;
  if (!isNarrow(density, peak)) return null;
  const reach = Math.floor(rivalReach * mains);
  for (let f = Math.max(skirt + 2, peak - reach); f <= Math.min(density.length - 1, peak + reach); f++) {
    const strong = Math.abs(f - peak) > skirt && density[f] >= rivalPart * density[peak];
    if (strong && isNarrow(density, f)) return null;
  }
  return peak;
}

function isNarrow(density: Float64Array, bin: number): boolean {
  let beside = 0;
  for (const k of [-skirt - 1, -skirt, skirt, skirt + 1]) beside += density[bin + k] ?? 0;
  return beside < 4 * narrow * density[bin];
}

/** Whether a line stands at the mains frequency (in bins) over a whole number. */
function hasPart(density: Float64Array, mains: number): boolean {
  for (let part = 2; part <= mostParts && mains / part > skirt + 2; part++) {
    let peak = Math.round(mains / part);
    for (const f of [peak - 1, peak + 1]) if (density[f] > density[peak]) peak = f;
    const beside = Math.max(density[peak - skirt], density[peak + skirt]);
    const floor = medianAround(density, peak, rivalFloorReach * mains);
    if (density[peak] > falling * beside && density[peak] > standing * floor) return true;
  }
  return false;
}

/** Median of the density up to `reach` bins away, the skirt of the line and the constant left out. */
function medianAround(density: Float64Array, bin: number, reach: number): number {
  const around: number[] = [];
  const to = Math.min(density.length - 1, Math.floor(bin + reach));
  for (let f = Math.max(2, Math.ceil(bin - reach)); f <= to; f++) {
    if (Math.abs(f - bin) > skirt) around.push(density[f]);
  }
  around.sort((a, b) => a - b);
  const middle = Math.floor(around.length / 2);
  return around.length === 0 ? Number.NaN : around[middle];
}

/** Part of the power that the lines at these bins have; the constant is left out. */
function shareOf(density: Float64Array, bins: readonly number[]): number {
  let all = 0;
  for (let f = 2; f < density.length; f++) all += density[f];
  let own = 0;
  for (const bin of bins) {
    for (let f = bin - skirt; f <= Math.min(density.length - 1, bin + skirt); f++) own += density[f];
  }
  return own / all;
}

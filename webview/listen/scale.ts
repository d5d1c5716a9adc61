/** Lowest and highest rate, in Hz, of signals that can be played. */
export const audible = { from: 8_000, to: 192_000 };

/** Seconds played at once. */
export const excerptSeconds = 10;

/** True where signals of this rate can be heard. */
export function canBeHeard(sampleRate: number | null): boolean {
  return sampleRate !== null && sampleRate >= audible.from && sampleRate <= audible.to;
}

/** Samples as sound: the loudest of all the given signals becomes full scale, and values that are no numbers silence. */
export function toSound(samples: Float64Array, largest: number): Float32Array<ArrayBuffer> {
  const sound = new Float32Array(samples.length);
  if (!(largest > 0)) return sound;
  for (let i = 0; i < samples.length; i++) {
    const value = samples[i] / largest;
    sound[i] = Number.isFinite(value) ? Math.max(-1, Math.min(1, value)) : 0;
  }
  return sound;
}

/** The largest size among the finite values. */
export function largestOf(signals: readonly Float64Array[]): number {
  let largest = 0;
  for (const samples of signals) {
    for (let i = 0; i < samples.length; i++) {
      const size = Math.abs(samples[i]);
      if (size > largest && Number.isFinite(size)) largest = size;
    }
  }
  return largest;
}

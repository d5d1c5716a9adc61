/** A package on the belt: when its front edge reaches the platform, in seconds, and its mass in kg. */
export interface Package {
  at: number;
  mass: number;
}

/** Lengths along the belt in metres. */
const platform = 0.4;
const footprint = 0.2;

/**
 * The load on the platform in kg: it grows while a package rolls on, stays while all of it is there, and falls while
 * it rolls off.
 */
export function load(packages: Package[], speed: number, sampleRate: number, length: number): Float64Array {
  const kilograms = new Float64Array(length);
  for (const { at, mass } of packages) {
    for (let n = 0; n < length; n++) {
      const front = speed * (n / sampleRate - at);
      const onPlatform = Math.min(front, footprint, platform + footprint - front);
      if (onPlatform > 0) kilograms[n] += (mass * onPlatform) / footprint;
    }
  }
  return kilograms;
}

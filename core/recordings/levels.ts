/** Levels of one channel over the whole recording, of its finite samples, in the file's own unit. */
export interface Levels {
  min: number;
  max: number;
  mean: number;
  rms: number;
  /** True where every finite sample is a whole number. */
  whole: boolean;
  /** Samples that are NaN or infinite, and the first of them. */
  notFinite: { count: number; first: number } | null;
}

import type { RecordedTake } from './pairing';

/** A sample pairing: its recordings, and the truth that a design can be held against. */
export interface Scenario {
  /** Name of the pairing document. */
  document: string;
  /** Recordings by file name. */
  files: Map<string, Uint8Array>;
  takes: RecordedTake[];
  /** Δ of the document. */
  delay: number;
  /** The document's limit of the held-out NMSE, in dB. */
  heldOutLimit: number;
  /** The best filter of the document's length, known from how the recordings were made; one row an input. */
  idealRows: number[][];
  /** A sentence: what the ideal is. */
  how: string;
}

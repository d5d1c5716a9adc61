/** The pairing document after validation: every key is there, defaults filled in. */

/** The version of the document's form, the value of its key `pairing`. */
export const documentVersion = 1;

export const jobs = ['cancel', 'identify', 'equalise', 'predict'] as const;
export type Job = (typeof jobs)[number];

export const windowings = ['covariance', 'autocorrelation'] as const;
export type Windowing = (typeof windowings)[number];

export const roundings = ['nearest', 'error-aware'] as const;
export type Rounding = (typeof roundings)[number];

export const overflows = ['saturate', 'wrap'] as const;
export type Overflow = (typeof overflows)[number];

export const languages = ['c', 'c-source', 'rs', 'csv', 'npy'] as const;
export type Language = (typeof languages)[number];

export const symmetries = ['none', 'even', 'odd'] as const;
export type Symmetry = (typeof symmetries)[number];

export const orders = ['newest-first', 'oldest-first'] as const;
export type Order = (typeof orders)[number];

/** Bits of an integer word, or a floating-point type. */
export type Word = number | 'float32' | 'float64';

/** The response of one input's taps is held at one frequency; its phase is that of the symmetry, or of the delay. */
export interface FixedGain {
  /** Number of the input, from 1. */
  input: number;
  /** Hz. */
  frequency: number;
  /** In the unit of the desired signal for one of the input. */
  gain: number;
}

/** A channel of a file; `channel` is a name from the header or a number from 1. */
export interface TrackEntry {
  file: string;
  channel: string | number;
}

/** `[from, to)`, in seconds or, where `samples` is true, in whole samples. */
export interface IntervalEntry {
  from: number;
  to: number;
  samples: boolean;
}

export interface TakeEntry {
  name: string;
  inputs: TrackEntry[];
  desired: TrackEntry;
  /** Null where the key was left out: what `heldOut` leaves, or the first two thirds where that is left out too. */
  fit: IntervalEntry[] | null;
  /** Null where the key was left out: the last third where `fit` is left out too, otherwise none. Empty: none. */
  heldOut: IntervalEntry[] | null;
  disturbanceOnly: IntervalEntry[];
}

/** A signal's word in the firmware. */
export interface SignalWord {
  word: Word;
  /** Amplitudes, in the recording's unit, that stand for 2^(B-1) counts: one for each input; null: drawn from the files. */
  fullScale: number[] | null;
}

export interface PairingDocument {
  title: string;
  job: Job;
  /** Hz; null where the files carry it. */
  sampleRate: number | null;
  takes: TakeEntry[];
  prepare: { removeMean: boolean; band: { from: number; to: number } | null };
  filter: {
    length: number;
    delay: number;
    regularisation: number;
    windowing: Windowing;
    /** `even`: w[k] = w[M-1-k] for each input; `odd`: w[k] = -w[M-1-k]. */
    symmetry: Symmetry;
    fixedGain: FixedGain | null;
  };
  arithmetic: {
    word: Word;
    /** Null: as many as the largest coefficient allows. */
    fractionBits: number | null;
    rounding: Rounding;
    accumulator: number;
    accumulatorOverflow: Overflow;
    overflow: Overflow;
    input: SignalWord;
    output: SignalWord;
    /** Cycles that the target needs for a multiply-accumulate. */
    cyclesPerMac: number;
  };
  write: {
    folder: string;
    symbol: string;
    languages: Language[];
    order: Order;
    /** Samples of the test vectors. */
    testVectors: number;
    /** Placed before and after the name of a coefficient array in C, and before the item in Rust; '' for none. */
    attributes: { cBefore: string; cAfter: string; rust: string };
  };
  limits: { heldOutNmse: number | null; quantisationLoss: number | null };
}

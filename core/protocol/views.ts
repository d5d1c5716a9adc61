import type { Job, PairingDocument } from '../document/pairingDocument';
import type { Severity } from '../findings/finding';
import type { Phrase } from '../findings/phrase';
import type { Interval } from '../pair/intervals';

/**
 * What the page shows, section by section, already reduced to what a screen can show. Pure data: numbers that may be
 * missing are null, series are Float64Arrays (NaN where a curve has a gap), texts are English templates filled in.
 */

/** A finding in words and where it leads. */
export interface FindingView {
  code: string;
  severity: Severity;
  /** The sentence, without its place. */
  text: string;
  /** `slow.csv, channel cell, samples 100 to 140`; empty where nothing is known. */
  place: string;
  /** What `text` was made from, for other languages; left out where it is in the user's language already. */
  sentence?: Phrase;
  /** The same for `place`. */
  placeParts?: Phrase[];
  file: string | null;
  take: string | null;
  channel: string | null;
  /** Samples, half-open; null where it has none. */
  span: Interval | null;
  /** Keys that lead to the value in the document, for the field; null where it is not in the document. */
  path: (string | number)[] | null;
  /** Place in the document's text, from 1; null where it is not in the document. */
  position: { line: number; column: number } | null;
}

export interface ChannelView {
  /** Name, or number from 1. */
  label: string;
  /** As a document names it: the name where it tells the channel apart, otherwise the number from 1. */
  entry: string | number;
  /** In the file's own unit; null for channels that were not read. */
  min: number | null;
  max: number | null;
  mean: number | null;
  rms: number | null;
  /** Relative to full scale for PCM, otherwise to one unit; null for silence. */
  peakDb: number | null;
  rmsDb: number | null;
}

export interface FileView {
  /** As the document names it. */
  file: string;
  /** In words. */
  format: string;
  pcm: boolean;
  samples: number;
  /** Hz; null where the file does not say. */
  sampleRate: number | null;
  channels: ChannelView[];
}

/** A signal of a take, one lane of the waveform. */
export interface TrackView {
  role: 'input' | 'desired';
  /** Number among the inputs, from 0. */
  index: number;
  file: string;
  /** Label of the channel. */
  channel: string;
  min: number;
  max: number;
}

/** A take with its intervals in whole samples. */
export interface TakeView {
  name: string;
  samples: number;
  tracks: TrackView[];
  fit: Interval[];
  heldOut: Interval[];
  disturbanceOnly: Interval[];
}

/** Section Recordings. */
export interface RecordingsView {
  /** Hz; null where it is not known. */
  sampleRate: number | null;
  files: FileView[];
  /** Empty where the document and its files do not fit each other. */
  takes: TakeView[];
}

/** Powers by frequency, dB relative to one unit²/Hz. */
export interface SpectrumView {
  /** Hz. */
  frequencies: Float64Array;
  lines: { label: string; role: 'input' | 'desired' | 'output' | 'error'; valuesDb: Float64Array }[];
}

export interface BandView {
  /** Hz. */
  from: number;
  to: number;
}

/** Section Suitability. */
export interface SuitabilityView {
  /** All findings, worst first. */
  findings: FindingView[];
  /** Kinds of fault that were looked for. */
  checks: number;
  /** Null where a blocker came first. */
  pair: {
    /** Most that any linear filter could take off, dB; null where that is withheld, for the reason in words. */
    attainableDb: number | null;
    atLeastDb: number | null;
    reason: string | null;
    bands: (BandView & { attainableDb: number | null })[];
    takes: {
      name: string;
      lagSamples: number | null;
      driftPpm: number | null;
      driftPpmStandardError: number | null;
      attainableDb: number | null;
    }[];
    coherence: {
      frequencies: Float64Array;
      values: Float64Array;
      /** 95 % confidence interval. */
      lower: Float64Array;
      upper: Float64Array;
      /** What unrelated signals exceed at one frequency in twenty. */
      significance: number;
      averages: number;
    } | null;
    /** Bands in which a model of the path says nothing (identify). */
    unknownBands: BandView[];
    spectrum: SpectrumView | null;
  } | null;
}

/** The two figures that follow every change at once; the rest of the evidence comes after them. */
export interface FiguresView {
  fitDb: number;
  fitSamples: number;
  /** Null where nothing is held out. */
  heldOutDb: number | null;
  heldOutSamples: number;
  /** False where `cancel` has no held-out stretch with the disturbance alone. */
  trustworthy: boolean;
  standardErrorDb: number | null;
  taps: number;
  inputs: number;
  job: Job;
  /** True where the figures are from sums of nearly the same samples, until the filter has been run. */
  provisional?: boolean;
}

/** Section Evidence. */
export interface EvidenceView extends FiguresView {
  /** NMSE that the attainable reduction allows (its negative); null where it is withheld. */
  limitDb: number | null;
  /** What the document's limit asks; null without. */
  askedDb: number | null;
  disturbanceOnly: boolean;
  outsideBandDb: number | null;
  takes: { name: string; nmseDb: number; standardErrorDb: number | null; samples: number }[];
  bands: (BandView & { reductionDb: number | null; attainableDb: number | null })[];
  conditionNumber: number;
  /** In words. */
  method: string;
  /** Of the held-out n (the fit's where nothing is held out): d[n-Δ], y and e. */
  spectrum: SpectrumView;
  /** Newest-first, one entry an input. */
  impulses: { label: string; values: Float64Array; standardErrors: Float64Array | null }[];
  /** Why there are no standard errors, in words; null where there are. */
  errorsWithheld: string | null;
  responses: {
    label: string;
    frequencies: Float64Array;
    magnitudeDb: Float64Array;
    /** 95 % interval; null where it is withheld. */
    lowDb: Float64Array | null;
    highDb: Float64Array | null;
    /** Degrees, -180 to 180. */
    phase: Float64Array;
    /** Samples; NaN where the magnitude is too small to tell. */
    groupDelay: Float64Array;
  }[];
  /** Tests of what is left in the fit, in words. */
  residuals: { test: string; expected: string; found: string; probability: string }[];
  /** Autocorrelation of what is left, and the bound that 95 % of white noise keeps to; null where not computed. */
  leftOver: { lags: Float64Array; correlation: Float64Array; bound: number } | null;
  /** Cautions that every note carries, in words. */
  cautions: string[];
}

/** Cross-validated errors, dB; NaN where a fit could not be solved. */
export interface ChoiceView {
  lengths: number[];
  delays: number[];
  regularisations: number[];
  /** Against length, at the present delay and regularisation: cross-validated, its standard error, and fitted. */
  byLength: { crossDb: Float64Array; errorDb: Float64Array; fitDb: Float64Array };
  /** Against delay, at the present length and regularisation. */
  byDelay: { crossDb: Float64Array; errorDb: Float64Array; fitDb: Float64Array };
  byRegularisation: { crossDb: Float64Array; errorDb: Float64Array; fitDb: Float64Array };
  /** `map[l * delays.length + d]`, at the present regularisation. */
  mapDb: Float64Array;
  present: { length: number; delay: number; regularisation: number; crossDb: number | null };
  /** Null while the search goes on. */
  suggestion: {
    length: number;
    delay: number;
    regularisation: number;
    crossDb: number;
    heldOutDb: number | null;
    macsPerSample: number;
    reason: string;
  } | null;
  /** As NMSE; null where it is withheld. */
  limitDb: number | null;
  opinions: { criterion: string; length: number; delay: number; regularisation: number }[];
  findings: FindingView[];
}

/** Label and value in words; `note` says more where there is more to say. */
export interface Row {
  label: string;
  value: string;
  note?: string;
}

/** A file as it would be written, against what is on disk. */
export interface PlannedFile {
  /** From the document's folder, with forward slashes. */
  path: string;
  /** `foreign`: a file of that name is there that Tapwright did not write. */
  change: 'new' | 'changed' | 'unchanged' | 'foreign';
  size: number;
}

/** Section Firmware. */
export interface FirmwareView {
  format: Row[];
  overflow: { verdict: string; safe: boolean };
  cost: Row[];
  lossDb: number | null;
  outputErrorDb: number | null;
  macsPerSecond: number;
  /** `16-bit`, `float32`. */
  word: string;
  /** Null where the target computes in floats. */
  words:
    | {
        word: number;
        rounding: string;
        fractionBits: number;
        accumulatorBits: number;
        lossDb: number | null;
        outputErrorDb: number | null;
        chosen: boolean;
      }[]
    | null;
  /** Name and text of the coefficient file as it would be written. */
  preview: { path: string; text: string } | null;
  files: PlannedFile[];
  /** `current`: what is on disk is what would be written. */
  state: 'not-written' | 'current' | 'stale';
  /** How the new taps differ from those written, in words; empty where they do not or none are written. */
  change: string[];
}

/** A recording by itself. */
export interface RecordingView {
  file: FileView | null;
  findings: FindingView[];
  checks: number;
  spectrum: SpectrumView | null;
}

/** The parts of a result, in the order in which they come. */
export interface Views {
  recordings: RecordingsView;
  figures: FiguresView;
  suitability: SuitabilityView;
  evidence: EvidenceView;
  firmware: FirmwareView;
  choice: ChoiceView;
  recording: RecordingView;
}

export type Part = keyof Views;

/** What the form shows: the document with its defaults, and the paths (joined by `/`) that its text gives. */
export interface FormView {
  document: PairingDocument;
  given: string[];
}

import type { PairingDocument } from '../document/pairingDocument';
import type { BandFigure } from '../evaluation/bandFigures';
import type { ErrorFigure } from '../evaluation/fitFigure';
import type { SpectraFigures, TakeFigure } from '../evaluation/heldOutFigures';
import type { Finding } from '../findings/finding';
import type { TestVectors } from '../numbers/testVectors';
import type { WorstCase } from '../numbers/worstCase';
import type { Interval } from '../pair/intervals';
import type { Levels } from '../recordings/levels';
import type { Method } from '../solvers/prepare';
import type { ChoiceLines, WithheldLines } from './choiceLines';
import type { Confidence } from './confidence';
import type { PairInspection } from './inspectPair';
import type { WordStudy } from './studyWords';

export type { BandFigure, Confidence, ErrorFigure, Interval, SpectraFigures, TakeFigure, TestVectors };

/** A recording that the design used. */
export interface RecordingSummary {
  file: string;
  format: string;
  sha256: string;
  samples: number;
  sampleRate: number | null;
  /** Labels of all channels and, in the same order, their levels over the whole file. */
  channels: string[];
  levels: Levels[];
}

/** A take with everything resolved to samples. */
export interface TakeSummary {
  name: string;
  samples: number;
  inputs: { file: string; channel: string }[];
  desired: { file: string; channel: string };
  fit: Interval[];
  heldOut: Interval[];
  disturbanceOnly: Interval[];
}

export interface HeldOutFigures extends ErrorFigure {
  /** NMSE outside the band that the error is weighted to, in dB, where all other figures are of the band; null without. */
  outsideBandDb: number | null;
  /** True where the figures are over the held-out part of `disturbanceOnly` intervals. */
  disturbanceOnly: boolean;
  bands: BandFigure[];
  takes: TakeFigure[];
}

/** The filter in the target's numbers. Amplitudes are in the recording's unit, counts are integers. */
export interface ArithmeticResult {
  /** One row an input, newest-first: integers, or floats where `word` is a float type. */
  values: Float64Array[];
  /** Null for float words. */
  fractionBits: number | null;
  /** Unit of one input count for each input, and of one output count; 1 for float words. */
  inputCount: number[];
  outputCount: number;
  /** fullScale resolved, one for each input; 1 for float words. */
  inputFullScale: number[];
  outputFullScale: number;
  /** `floor(mean/q + ½)` for each input: what the firmware takes off. */
  inputMeanCounts: number[];
  /** The desired mean in output counts, for the jobs that add it back to y. */
  desiredMeanCounts: number;
  /** Worst case of the accumulator, the rounding term included, and the bits it needs; null for float words. */
  worstCase: WorstCase | null;
  /** The same for inputs that keep to the extremes of the recordings. */
  recordedCase: WorstCase | null;
  /** Bit-true run over the held-out n (the fit's where nothing is held out); null where it could not be run. */
  heldOutNmseDb: number | null;
  quantisationLossDb: number | null;
  outputErrorDb: number | null;
  /** Samples at which the accumulator or the output overflowed, of `samples` run. */
  accumulatorOverflows: number;
  outputOverflows: number;
  samples: number;
}

/** What the document asks of the taps' shape, and what it costs. */
export interface ShapeResult {
  /** The gain of the taps and of the target's at the fixed frequency: in phase and, where it is held too, in quadrature. */
  gain: { asked: number; taps: number[]; target: number[] } | null;
  /** Held-out NMSE (the fit's where nothing is held out) without it, and the rise that it costs, in dB. */
  prices: { without: 'shape' | 'gain'; nmseDb: number; priceDb: number }[];
}

/** Everything a design found; the texts of the files are made from this alone. */
export interface DesignResult {
  document: PairingDocument;
  /** File name of the document, without folder. */
  documentFile: string;
  documentSha256: string;
  /** Hz. */
  sampleRate: number;
  recordings: RecordingSummary[];
  takes: TakeSummary[];
  /** Labels of the inputs and of the desired signal (those of the first take). */
  inputs: string[];
  desired: string;
  /** One row an input, newest-first. */
  coefficients: Float64Array[];
  means: { inputs: number[]; desired: number };
  /** Mean square of each input over the fit intervals, after mean removal. */
  inputPowers: number[];
  method: Method;
  conditionNumber: number;
  fit: ErrorFigure;
  confidence: Confidence;
  heldOut: HeldOutFigures | null;
  spectra: SpectraFigures;
  /** Of the pair; null where it was not asked for. */
  inspection: PairInspection | null;
  arithmetic: ArithmeticResult;
  /** The document's length, delay and regularisation held against others; null where it was not asked for. */
  choice: ChoiceLines | WithheldLines | null;
  /** Null where the taps are free. */
  shape: ShapeResult | null;
  /** Null where the target computes in floats, or where it was not asked for. */
  words: WordStudy | null;
  vectors: TestVectors;
  /** Worst first. */
  findings: Finding[];
}

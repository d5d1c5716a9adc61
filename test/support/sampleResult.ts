import type {
  Job,
  Language,
  Order,
  Overflow,
  PairingDocument,
  Word,
} from '../../core/document/pairingDocument';
import { type Finding, finding } from '../../core/findings/finding';
import type { ChoiceLines } from '../../core/pipeline/choiceLines';
import type { Confidence } from '../../core/pipeline/confidence';
import type { DesignResult, HeldOutFigures, SpectraFigures } from '../../core/pipeline/designResult';
import { exactFilter } from './exactFilter';
import { seededUniform } from './random';

/** What a sample result can be asked to differ in. */
export interface SampleOptions {
  job?: Job;
  title?: string;
  documentFile?: string;
  file?: string;
  take?: string;
  inputs?: string[];
  desired?: string;
  length?: number;
  delay?: number;
  removeMean?: boolean;
  word?: Word;
  inputWord?: number;
  outputWord?: number;
  accumulator?: number;
  accumulatorOverflow?: Overflow;
  overflow?: Overflow;
  /** Makes every coefficient larger, so that the output leaves its word. */
  gain?: number;
  order?: Order;
  languages?: Language[];
  vectors?: number;
  attributes?: PairingDocument['write']['attributes'];
  heldOut?: 'none' | 'all' | 'disturbance only';
  symbol?: string;
  folder?: string;
}

const rate = 2000;
const inputFullScale = 4;
const outputFullScale = 64;

/**
 * A design result as the pipeline would make one: a conveyor checkweigher's noise canceller with decaying responses,
 * figures of the size that such a bench gives, and test vectors computed here with big integers.
 */
export function sampleResult(options: SampleOptions = {}): DesignResult {
  const document = sampleDocument(options);
  const { word } = document.arithmetic;
  const labels = options.inputs ?? ['frame_x', 'frame_z'];
  const coefficients = labels.map((_, r) => response(document.filter.length, r, options.gain ?? 1));
  const file = options.file ?? 'slow.csv';
  const desired = options.desired ?? 'cell';
  const integers = typeof word === 'number';
  const inputCount = integers ? inputFullScale / 2 ** ((options.inputWord ?? 16) - 1) : 1;
  const outputCount = integers ? outputFullScale / 2 ** ((options.outputWord ?? 16) - 1) : 1;
  const counts = coefficients.map((row) => row.map((w) => (w * inputCount) / outputCount));
  const fractionBits = integers ? bitsThatFit(counts, word, document.arithmetic.accumulator) : null;
  const values = counts.map((row) => row.map((c) => rounded(c, word, fractionBits)));
  const input = labels.map((_, r) => excitation(document, r));
  const means = { inputs: labels.map((_, r) => 0.25 - 0.5 * r), desired: 12.5 };
  const used = document.prepare.removeMean ? means : { inputs: labels.map(() => 0), desired: 0 };
  const count = document.write.testVectors;
  const parts: DesignResult['vectors']['parts'] =
    count === 0 ? [] : [{ part: 'excerpt', input: null, from: 0, to: count }];
  const run = exactFilter({ values, fractionBits, input, document });
  return {
    document,
    documentFile: options.documentFile ?? 'belt.pairing.json',
    documentSha256: 'd0c'.padEnd(64, '0'),
    sampleRate: rate,
    recordings: [
      {
        file,
        format: `text, ${labels.length + 1} columns separated by ,`,
        sha256: 'abc123'.padEnd(64, 'f'),
        samples: 120000,
        sampleRate: rate,
        channels: [...labels, desired],
        levels: [...labels, desired].map((_, c) => ({
          min: -2.5 - c,
          max: 3.25 + c,
          mean: c < labels.length ? means.inputs[c] : means.desired,
          rms: 0.731 + c,
          whole: false,
          notFinite: null,
        })),
      },
    ],
    takes: [
      {
        name: options.take ?? 'slow belt',
        samples: 120000,
        inputs: labels.map((channel) => ({ file, channel })),
        desired: { file, channel: desired },
        fit: [{ from: 0, to: 80000 }],
        heldOut: options.heldOut === 'none' ? [] : [{ from: 80000, to: 120000 }],
        disturbanceOnly:
          (options.heldOut ?? 'disturbance only') === 'disturbance only'
            ? [{ from: 100000, to: 120000 }]
            : [],
      },
    ],
    inputs: labels,
    desired,
    coefficients,
    means: used,
    inputPowers: labels.map((_, r) => 0.5344 / (r + 1)),
    method: 'cholesky',
    conditionNumber: 1043.7,
    fit: { samples: 79937, mse: 0.0123456789, nmseDb: -31.204 },
    confidence: confidence(coefficients, options),
    heldOut: heldOut(options),
    spectra: spectra(),
    arithmetic: {
      values,
      fractionBits,
      inputCount: labels.map(() => inputCount),
      outputCount,
      inputFullScale: labels.map(() => (integers ? inputFullScale : 1)),
      outputFullScale: integers ? outputFullScale : 1,
      inputMeanCounts: used.inputs.map((mean) =>
        integers ? Math.floor(mean / inputCount + 0.5) : Math.fround(mean),
      ),
      desiredMeanCounts: integers ? Math.floor(used.desired / outputCount + 0.5) : Math.fround(used.desired),
      worstCase: run.worstCase,
      recordedCase: run.worstCase,
      heldOutNmseDb: -30.817,
      quantisationLossDb: 0.0132,
      outputErrorDb: -71.046,
      accumulatorOverflows: 0,
      outputOverflows: 0,
      samples: { none: 79937, all: 40000, 'disturbance only': 20000 }[options.heldOut ?? 'disturbance only'],
    },
    inspection: null,
    choice: null,
    shape: null,
    words: integers ? sampleStudy() : null,
    vectors: { input, expected: run.output, parts },
    findings: findings(document, options.heldOut ?? 'disturbance only'),
  };
}

/** Errors of a thousandth of a tap's size, and a residual in which nothing is left. */
function confidence(coefficients: readonly Float64Array[], { job }: SampleOptions): Confidence {
  const points = 129;
  const row = (value: number) => new Float64Array(points).fill(value);
  const sides = job === 'predict' ? (['after'] as const) : (['before', 'after'] as const);
  return {
    window: 1024,
    errors: {
      standardErrors: coefficients.map((taps, r) => taps.map(() => 0.003 * (r + 1))),
      response: {
        points,
        inputs: coefficients.map((_, r) => ({
          real: row(4e-4 * (r + 1)),
          imaginary: row(3e-4 * (r + 1)),
          both: row(1e-5),
        })),
      },
    },
    residuals: {
      samples: 79937,
      autocorrelation: Float64Array.from({ length: 201 }, (_, k) => 0.4 ** k),
      bound: 0.00693,
      whiteness: { lags: 20, statistic: 15600.25, degreesOfFreedom: 20, probability: 0 },
      inputs: coefficients.map((taps) => ({
        from: -32,
        values: new Float64Array(taps.length + 64).fill(1e-3),
        bound: 0.0081,
        inside: 2.5e-6,
        fromRegularisation: 2.5e-6,
      })),
      extra: sides.flatMap((side) =>
        coefficients.map((_, input) => ({ input, side, lags: 32, probability: 0.42, share: 1e-5 })),
      ),
    },
  };
}

function sampleStudy(): NonNullable<DesignResult['words']> {
  const figures = (loss: number) => ({
    nmseDb: -30.83 + loss,
    quantisationLossDb: loss,
    outputErrorDb: -71 + loss,
  });
  return {
    samples: 20000,
    words: [
      { word: 8, rounding: 'nearest', fractionBits: 7, accumulatorBits: 26, ...figures(3.21) },
      { word: 8, rounding: 'error-aware', fractionBits: 7, accumulatorBits: 26, ...figures(0.87) },
      { word: 16, rounding: 'nearest', fractionBits: 15, accumulatorBits: 34, ...figures(0.02) },
      { word: 16, rounding: 'error-aware', fractionBits: 15, accumulatorBits: 34, ...figures(0.01) },
    ],
    shares: { input: figures(0.003), taps: figures(0.004), output: figures(0.006) },
  };
}

function sampleDocument(options: SampleOptions): PairingDocument {
  const file = options.file ?? 'slow.csv';
  const word = options.word ?? 16;
  const signal = (bits: number | undefined, scale: number) => ({
    word: typeof word === 'number' ? (bits ?? 16) : word,
    fullScale: [scale],
  });
  return {
    title: options.title ?? 'Checkweigher belt',
    job: options.job ?? 'cancel',
    sampleRate: null,
    takes: [
      {
        name: options.take ?? 'slow belt',
        inputs: (options.inputs ?? ['frame_x', 'frame_z']).map((channel) => ({ file, channel })),
        desired: { file, channel: options.desired ?? 'cell' },
        fit: null,
        heldOut: null,
        disturbanceOnly: [],
      },
    ],
    prepare: { removeMean: options.removeMean ?? true, band: null },
    filter: {
      length: options.length ?? 64,
      delay: options.delay ?? 0,
      regularisation: 1e-4,
      windowing: 'covariance',
      symmetry: 'none',
      fixedGain: null,
    },
    arithmetic: {
      word,
      fractionBits: null,
      rounding: 'error-aware',
      accumulator: options.accumulator ?? 40,
      accumulatorOverflow: options.accumulatorOverflow ?? 'wrap',
      overflow: options.overflow ?? 'saturate',
      input: signal(options.inputWord, inputFullScale),
      output: signal(options.outputWord, outputFullScale),
      cyclesPerMac: 1,
    },
    write: {
      folder: options.folder ?? 'generated',
      symbol: options.symbol ?? 'belt',
      languages: options.languages ?? ['c'],
      order: options.order ?? 'newest-first',
      testVectors: options.vectors ?? 256,
      attributes: options.attributes ?? { cBefore: '', cAfter: '', rust: '' },
    },
    limits: { heldOutNmse: -20, quantisationLoss: 0.1 },
  };
}

/** A decaying oscillation that starts after a few samples. */
function response(length: number, r: number, gain: number): Float64Array {
  return Float64Array.from({ length }, (_, k) => {
    const t = k - 4 - 3 * r;
    return t < 0 ? -0.002 * gain * (k + 1) : gain * (9 - 4 * r) * Math.exp(-t / 9) * Math.cos(0.55 * t + r);
  });
}

function bitsThatFit(counts: readonly Float64Array[], word: number, accumulator: number): number {
  const largest = Math.max(...counts.flatMap((row) => Array.from(row, Math.abs)));
  let bits = 0;
  while (bits < accumulator - 2 && largest * 2 ** (bits + 1) + 1 < 2 ** (word - 1)) bits++;
  return bits;
}

function rounded(value: number, word: Word, fractionBits: number | null): number {
  if (word === 'float64') return value;
  return fractionBits === null ? Math.fround(value) : Math.floor(value * 2 ** fractionBits + 0.5);
}

/** Noise over the whole word, extremes included, so that every overflow rule is met. */
function excitation(document: PairingDocument, r: number): Float64Array {
  const uniform = seededUniform(7 + r);
  const { word } = document.arithmetic.input;
  return Float64Array.from({ length: document.write.testVectors }, (_, n) => {
    if (typeof word !== 'number') return Math.fround(2 * uniform() - 1);
    const half = 2 ** (word - 1);
    if (n < 2) return n === 0 ? -half : half - 1;
    return Math.floor((2 * uniform() - 1) * half);
  });
}

/** What the pipeline would have found. */
function findings(document: PairingDocument, heldOut: 'none' | 'all' | 'disturbance only'): Finding[] {
  if (heldOut === 'none') return [finding('no-held-out'), ...untested('nothing was held out')];
  if (document.job !== 'cancel' || heldOut === 'disturbance only') return [];
  const why = 'the wanted signal counts as error, without a disturbance-only stretch';
  return [finding('no-disturbance-only'), ...untested(why)];
}

function untested(why: string): Finding[] {
  return [
    finding('limit-not-tested', { what: 'the held-out NMSE', why }, { path: ['limits', 'heldOutNmse'] }),
    finding(
      'limit-not-tested',
      { what: 'the quantisation loss', why },
      { path: ['limits', 'quantisationLoss'] },
    ),
  ];
}

function heldOut({ heldOut: which, take }: SampleOptions): HeldOutFigures | null {
  if (which === 'none') return null;
  const samples = which === 'all' ? 40000 : 20000;
  const figure = { samples, mse: 0.0131234, nmseDb: -30.83 };
  return {
    ...figure,
    outsideBandDb: null,
    disturbanceOnly: which !== 'all',
    bands: [12.1, 25.31, 33.02, -0.42].map((reductionDb, b) => ({
      from: 250 * b,
      to: 250 * (b + 1),
      reductionDb,
    })),
    takes: [{ name: take ?? 'slow belt', ...figure, standardErrorDb: 0.213 }],
  };
}

function spectra(): SpectraFigures {
  const segment = 512;
  const frequencies = Float64Array.from({ length: segment / 2 + 1 }, (_, i) => (i * rate) / segment);
  const uniform = seededUniform(3);
  const peak = (f: number, at: number, width: number) => 1 / (1 + ((f - at) / width) ** 2);
  const desired = frequencies.map(
    (f) => (0.002 + peak(f, 48, 6) + 0.3 * peak(f, 175, 9)) * (0.8 + 0.4 * uniform()),
  );
  const error = frequencies.map((f) => (0.0008 + 0.002 * peak(f, 48, 30)) * (0.8 + 0.4 * uniform()));
  return { segment, averages: 77, frequencies, desired, output: desired.map((d, i) => d - error[i]), error };
}

/** Errors along the three lines, as a search would find them: a shorter filter is worse, another delay is better. */
export function sampleChoice(): ChoiceLines {
  const line = (values: number[], own: number, crossDb: number[]) => ({
    values,
    own,
    crossDb: Float64Array.from(crossDb),
    errorDb: Float64Array.from(crossDb, () => 0.21),
    fitDb: Float64Array.from(crossDb, (value) => value - 0.3),
  });
  return {
    length: line([32, 48, 64, 80], 2, [-12.5, -24.25, -30.5, -30.52]),
    delay: line([-1, 0, 1], 1, [-29.75, -30.5, -31.25]),
    regularisation: line([1e-6, 1e-4, 1], 1, [Number.NaN, -30.5, -3]),
    validation: { by: 'blocks', blocks: 10, gap: 128, samples: 77_000 },
  };
}

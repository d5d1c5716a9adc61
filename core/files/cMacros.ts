import type { DesignResult } from '../pipeline/designResult';
import { cLiteral } from './literals';
import { meanType, type NumberType, numberType } from './numberTypes';
import { symmetryNumber } from './orderedRow';
import { addsDesiredMean } from './outputSteps';
import { signalWords } from './signalWords';

const real = numberType('float64');

/** The macros of `SYMBOL_taps.h`, a comment beside each; their prefix is the symbol in upper case. */
export function cMacros(result: DesignResult): string[] {
  const { document, arithmetic } = result;
  const prefix = document.write.symbol.toUpperCase();
  const rows: [string, string, string][] = [
    ['SAMPLE_RATE', cLiteral(result.sampleRate, real), 'Hz'],
    ['LENGTH', String(document.filter.length), 'taps of each input'],
    ['INPUTS', String(result.inputs.length), 'rows of the array'],
    [
      'NEWEST_FIRST',
      document.write.order === 'newest-first' ? '1' : '0',
      '1: row[0] multiplies the newest sample',
    ],
    [
      'SYMMETRY',
      bracketed(symmetryNumber[document.filter.symmetry]),
      '1: w[k] = w[M-1-k]; -1: w[k] = -w[M-1-k]; 0: neither',
    ],
    ['DELAY', bracketed(document.filter.delay), 'samples: e[n] = d[n - DELAY] - y[n]'],
    ...(arithmetic.fractionBits === null ? [] : integerRows(result)),
    [
      'INPUT_MEANS',
      initialiser(arithmetic.inputMeanCounts, meanType(signalWords(document).input)),
      meanUnit(result),
    ],
    ...desiredMean(result),
    ...scales(result),
  ];
  const width = Math.max(...rows.map(([name]) => name.length));
  return rows.map(([name, value, says]) => `#define ${prefix}_${name.padEnd(width)} ${value} /* ${says} */`);
}

function integerRows({ document, arithmetic }: DesignResult): [string, string, string][] {
  const { word, input, output, accumulator, accumulatorOverflow, overflow } = document.arithmetic;
  return [
    ['TAP_BITS', String(word), 'word of a tap'],
    ['INPUT_BITS', String(input.word), 'word of x'],
    ['OUTPUT_BITS', String(output.word), 'word of y'],
    ['FRACTION_BITS', String(arithmetic.fractionBits), 'F: a tap stands for tap / 2^F'],
    ['ACCUMULATOR_BITS', String(accumulator), 'the accumulator that the design assumes'],
    [
      'WORST_CASE_BITS',
      String(arithmetic.worstCase?.bits ?? 0),
      'what no input can exceed, rounding included',
    ],
    ['ACCUMULATOR_SATURATES', accumulatorOverflow === 'saturate' ? '1' : '0', '0: additions wrap'],
    ['OUTPUT_SATURATES', overflow === 'saturate' ? '1' : '0', '0: y wraps'],
  ];
}

function meanUnit({ document }: DesignResult): string {
  return typeof signalWords(document).input === 'number' ? 'counts, to take off' : 'to take off';
}

function desiredMean(result: DesignResult): [string, string, string][] {
  if (!addsDesiredMean(result)) return [];
  const word = signalWords(result.document).output;
  const type = meanType(word);
  const says = typeof word === 'number' ? 'counts, to add to y' : 'to add to y';
  return [['DESIRED_MEAN', bracketedLiteral(result.arithmetic.desiredMeanCounts, type), says]];
}

function scales({ arithmetic }: DesignResult): [string, string, string][] {
  if (arithmetic.fractionBits === null) return [];
  return [
    [
      'INPUT_COUNTS_PER_UNIT',
      initialiser(
        arithmetic.inputCount.map((q) => 1 / q),
        real,
      ),
      'of the recording',
    ],
    ['OUTPUT_COUNTS_PER_UNIT', cLiteral(1 / arithmetic.outputCount, real), 'of the recording'],
  ];
}

function initialiser(values: readonly number[], type: NumberType): string {
  return `{ ${values.map((v) => cLiteral(v, type)).join(', ')} }`;
}

function bracketed(value: number): string {
  return value < 0 ? `(${value})` : String(value);
}

function bracketedLiteral(value: number, type: NumberType): string {
  const text = cLiteral(value, type);
  return text.startsWith('-') ? `(${text})` : text;
}

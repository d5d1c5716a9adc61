import type { DesignResult } from '../pipeline/designResult';
import { asciiText } from './asciiText';
import { type Mark, markLine } from './generatedMark';
import { headComment } from './headComment';
import { listed, literal } from './literals';
import { meanType, type NumberType, numberType } from './numberTypes';
import { orderedRow, symmetryNumber } from './orderedRow';
import { addsDesiredMean } from './outputSteps';
import { signalWords } from './signalWords';

const real = numberType('float64');

/** Text of `SYMBOL_taps.rs`: the coefficients as constants of a Rust module that needs no standard library. */
export function rustTaps(result: DesignResult, mark: Mark): string {
  const { document, arithmetic, inputs } = result;
  const { order } = document.write;
  const type = numberType(document.arithmetic.word);
  const index = order === 'newest-first' ? 'k' : 'LENGTH - 1 - k';
  const of = inputs.length === 1 ? '' : '_r';
  return [
    markLine(mark, 'rust'),
    ...headComment(result).map((line) => `// ${line}`.trimEnd()),
    '',
    ...constants(result),
    '',
    `/// tap${of}[k], which multiplies x${of}[n - k], is \`TAPS[${of === '' ? 0 : 'r'}][${index}]\`.`,
    ...(document.write.attributes.rust === '' ? [] : [document.write.attributes.rust]),
    `pub static TAPS: [[${type.rust}; LENGTH]; INPUTS] = [`,
    ...arithmetic.values.flatMap((row, r) => [
      `    // ${r}: ${asciiText(inputs[r])}`,
      '    [',
      listed(
        Array.from(orderedRow(row, order), (v) => literal(v, type)),
        '        ',
      ),
      '    ],',
    ]),
    '];',
    '',
  ].join('\n');
}

function constants(result: DesignResult): string[] {
  const { document, arithmetic } = result;
  const words = signalWords(document);
  const input = meanType(words.input);
  const output = meanType(words.output);
  const integers = arithmetic.fractionBits !== null;
  const means = array(arithmetic.inputMeanCounts, input);
  const mean = literal(arithmetic.desiredMeanCounts, output);
  return [
    `pub const SAMPLE_RATE: f64 = ${literal(result.sampleRate, real)};`,
    `pub const LENGTH: usize = ${document.filter.length};`,
    `pub const INPUTS: usize = ${result.inputs.length};`,
    `pub const NEWEST_FIRST: bool = ${document.write.order === 'newest-first'};`,
    `pub const SYMMETRY: i32 = ${symmetryNumber[document.filter.symmetry]};`,
    `pub const DELAY: i32 = ${document.filter.delay};`,
    `pub const INPUT_MEANS: ${means};`,
    ...(addsDesiredMean(result) ? [`pub const DESIRED_MEAN: ${output.rust} = ${mean};`] : []),
    ...(integers ? integerConstants(result) : []),
  ];
}

function integerConstants({ document, arithmetic }: DesignResult): string[] {
  const scales = array(
    arithmetic.inputCount.map((q) => 1 / q),
    real,
  );
  return [
    `pub const FRACTION_BITS: u32 = ${arithmetic.fractionBits};`,
    `pub const ACCUMULATOR_BITS: u32 = ${document.arithmetic.accumulator};`,
    `pub const INPUT_COUNTS_PER_UNIT: ${scales};`,
    `pub const OUTPUT_COUNTS_PER_UNIT: f64 = ${literal(1 / arithmetic.outputCount, real)};`,
  ];
}

/** Type and value of a constant with one number for each input. */
function array(values: readonly number[], type: NumberType): string {
  return `[${type.rust}; INPUTS] = [${values.map((v) => literal(v, type)).join(', ')}]`;
}

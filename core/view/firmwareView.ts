import { changeInWords } from '../comparison/changeInWords';
import type { DesignChange } from '../comparison/compareDesigns';
import type { DesignFile } from '../files/designFiles';
import { filterCost } from '../files/filterCost';
import { wordInWords } from '../files/numberTypes';
import { costRows } from '../note/sections/cost';
import { formatRows } from '../note/sections/numberFormat';
import type { DesignResult } from '../pipeline/designResult';
import type { FirmwareView, PlannedFile, Row } from '../protocol/views';
import { finiteOrNull } from './finiteOrNull';
import { signalName } from './signalName';

/** Bytes of the preview at most; a filter of thousands of taps need not be shown to its end. */
const mostPreview = 64 * 1024;

/**
 * @param files as they would be written
 * @param planned the same against what is on disk
 * @param change against the taps that are written; null where there are none or they are the same
 */
export function firmwareView(
  result: DesignResult,
  files: readonly DesignFile[],
  planned: readonly PlannedFile[],
  change: DesignChange | null,
): FirmwareView {
  const { arithmetic, document, words } = result;
  const cost = filterCost(result);
  return {
    format: formatRows(result, signalName).map(row),
    overflow: overflow(result),
    cost: costRows(result).map(row),
    lossDb: finiteOrNull(arithmetic.quantisationLossDb),
    outputErrorDb: finiteOrNull(arithmetic.outputErrorDb),
    macsPerSecond: cost.macsPerSecond,
    word: wordInWords(document.arithmetic.word),
    words:
      words?.words.map(
        ({ word, rounding, fractionBits, accumulatorBits, quantisationLossDb, outputErrorDb }) => ({
          word,
          rounding,
          fractionBits,
          accumulatorBits,
          lossDb: finiteOrNull(quantisationLossDb),
          outputErrorDb: finiteOrNull(outputErrorDb),
          chosen: word === document.arithmetic.word && rounding === document.arithmetic.rounding,
        }),
      ) ?? null,
    preview: preview(files),
    files: [...planned],
    state: stateOf(planned),
    change: change === null ? [] : changeInWords(change),
  };
}

function row([label, value]: string[]): Row {
  return { label, value };
}

function overflow({ arithmetic, document }: DesignResult): FirmwareView['overflow'] {
  const { worstCase, recordedCase, accumulatorOverflows, outputOverflows } = arithmetic;
  const bits = document.arithmetic.accumulator;
  if (worstCase === null || recordedCase === null) {
    return { verdict: 'Floating point: nothing to overflow at these levels.', safe: true };
  }
  const seen = accumulatorOverflows + outputOverflows;
  if (worstCase.bits <= bits) {
    const output = outputOverflows > 0 ? ` The output left its word at ${outputOverflows} samples.` : '';
    return {
      verdict: `The accumulator cannot overflow: the worst case needs ${worstCase.bits} of ${bits} bits.${output}`,
      safe: outputOverflows === 0,
    };
  }
  const recorded =
    recordedCase.bits <= bits
      ? `signals that keep to the extremes of the recordings need ${recordedCase.bits} and cannot`
      : `so can signals that keep to the extremes of the recordings, which need ${recordedCase.bits}`;
  const happened = seen > 0 ? ` It happened at ${accumulatorOverflows} samples of the run.` : '';
  return {
    verdict: `The accumulator can overflow: the worst case needs ${worstCase.bits} bits and has ${bits}; ${recorded}.${happened}`,
    safe: false,
  };
}

/** The coefficient file: the first that is written. */
function preview(files: readonly DesignFile[]): FirmwareView['preview'] {
  const file = files.find(({ path }) => /_taps\.(h|rs|csv)$/.test(path));
  if (file === undefined) return null;
  const text = new TextDecoder().decode(file.bytes.subarray(0, mostPreview));
  return { path: file.path, text: file.bytes.length > mostPreview ? `${text}\n…` : text };
}

function stateOf(planned: readonly PlannedFile[]): FirmwareView['state'] {
  if (planned.every(({ change }) => change === 'unchanged')) return 'current';
  return planned.every(({ change }) => change === 'new') ? 'not-written' : 'stale';
}

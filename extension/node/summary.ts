import { changeInWords } from '../../core/comparison/changeInWords';
import type { DesignChange } from '../../core/comparison/compareDesigns';
import { decibels } from '../../core/figures/decibels';
import { jobWords } from '../../core/figures/jobWords';
import { counted, grouped, significant } from '../../core/figures/numbers';
import { visible } from '../../core/figures/visible';
import { comparableLimit } from '../../core/pipeline/comparableLimit';
import type { DesignResult } from '../../core/pipeline/designResult';

/** How the taps differ from those that are about to be overwritten, in a few lines for a terminal. */
export function changeSummary({ documentFile }: DesignResult, change: DesignChange): string {
  const [taps, effect] = changeInWords(change);
  return inRows(`${visible(documentFile)}, against what is written`, [
    ['change', taps],
    ['', effect],
  ]);
}

/** The result of a design in a few lines for a terminal. */
export function designSummary(result: DesignResult): string {
  const { document, fit, heldOut, arithmetic } = result;
  const { length, delay, regularisation } = document.filter;
  const inputs = result.coefficients.length;
  const rows: [string, string][] = [
    [
      'filter',
      `${counted(length, 'tap')}${inputs > 1 ? ` for each of ${inputs} inputs` : ''}, delay ${delay}, regularisation ${significant(regularisation)}, condition number ${significant(Number(result.conditionNumber.toPrecision(2)))}`,
    ],
    ['fit', `${decibels(fit.nmseDb)} over ${counted(fit.samples, 'sample')}`],
    [
      'held out',
      heldOut === null
        ? 'nothing: the result is not proved'
        : `${decibels(heldOut.nmseDb)} over ${counted(heldOut.samples, 'sample')}${heldOut.disturbanceOnly ? ', disturbance only' : ''}`,
    ],
  ];
  if (heldOut !== null && heldOut.takes.length > 1) {
    for (const take of heldOut.takes) {
      const error = take.standardErrorDb === null ? '' : ` ± ${take.standardErrorDb.toFixed(2)}`;
      rows.push(['', `${visible(take.name)}: ${decibels(take.nmseDb)}${error}`]);
    }
  }
  if (heldOut !== null && heldOut.outsideBandDb !== null) {
    rows.push(['', `outside the band: ${decibels(heldOut.outsideBandDb)}`]);
  }
  const limit = comparableLimit(result);
  if (limit !== null)
    rows.push(['limit', `a reduction of about ${decibels(limit)} for any linear filter, by the coherence`]);
  rows.push(['target', targetLine(result)]);
  if (arithmetic.accumulatorOverflows + arithmetic.outputOverflows > 0) {
    rows.push([
      '',
      `overflows: accumulator ${grouped(arithmetic.accumulatorOverflows)}, output ${grouped(arithmetic.outputOverflows)}`,
    ]);
  }
  const title = `${visible(document.title)} (${jobWords[document.job]}, ${visible(result.documentFile)})`;
  return inRows(title, rows);
}

function inRows(title: string, rows: readonly [string, string][]): string {
  return [title, ...rows.map(([name, text]) => `  ${name.padEnd(9)} ${text}`)].join('\n');
}

function targetLine({ document, arithmetic }: DesignResult): string {
  const loss = `loss ${decibels(arithmetic.quantisationLossDb)}`;
  if (arithmetic.worstCase === null) return `${document.arithmetic.word}, ${loss}`;
  return `${document.arithmetic.word}-bit taps with ${arithmetic.fractionBits} fraction bits, ${loss}, accumulator needs ${arithmetic.worstCase.bits} of ${document.arithmetic.accumulator} bits`;
}

import { residualRows } from '../note/residualTests';
import { cautionTexts } from '../note/sections/cautions';
import { solverWords } from '../note/sections/choices';
import { withheldReasons } from '../note/tapErrors';
import { comparableBands, comparableLimit } from '../pipeline/comparableLimit';
import type { DesignResult } from '../pipeline/designResult';
import type { EvidenceView, FiguresView, SpectrumView } from '../protocol/views';
import { finiteDecibels, finiteOrNull } from './finiteOrNull';
import { responseView } from './responseView';
import { signalName } from './signalName';
import { decibelsOf } from './suitabilityView';

/** @param figures of the same result */
export function evidenceView(result: DesignResult, figures: FiguresView): EvidenceView {
  const { heldOut, confidence, document, inputs, coefficients, sampleRate } = result;
  const { errors, residuals } = confidence;
  const withheld = 'withheld' in errors;
  const attainableDb = comparableLimit(result);
  const attainableBands = comparableBands(result);
  return {
    ...figures,
    limitDb: attainableDb === null ? null : -attainableDb,
    askedDb: document.limits.heldOutNmse,
    disturbanceOnly: heldOut?.disturbanceOnly ?? false,
    outsideBandDb: finiteOrNull(heldOut?.outsideBandDb),
    takes: (heldOut?.takes ?? []).map(({ name, nmseDb, standardErrorDb, samples }) => ({
      name,
      nmseDb: finiteDecibels(nmseDb),
      standardErrorDb: finiteOrNull(standardErrorDb),
      samples,
    })),
    bands: (heldOut?.bands ?? []).map(({ from, to, reductionDb }, b) => ({
      from,
      to,
      reductionDb: finiteOrNull(reductionDb),
      attainableDb: finiteOrNull(attainableBands[b]),
    })),
    conditionNumber: Number.isFinite(result.conditionNumber) ? result.conditionNumber : Number.MAX_VALUE,
    method: solverWords[result.method],
    spectrum: spectrum(result),
    impulses: inputs.map((label, r) => ({
      label,
      values: coefficients[r],
      standardErrors: withheld ? null : errors.standardErrors[r],
    })),
    errorsWithheld: withheld ? withheldReasons[errors.withheld] : null,
    responses: inputs.map((label, r) =>
      responseView(label, coefficients[r], sampleRate, withheld ? null : errors.response.inputs[r]),
    ),
    residuals: residualRows(result, signalName).map(([test, expected, found, probability]) => ({
      test,
      expected,
      found,
      probability,
    })),
    leftOver: {
      lags: residuals.autocorrelation.map((_, lag) => lag),
      correlation: residuals.autocorrelation,
      bound: residuals.bound,
    },
    cautions: cautionTexts(result),
  };
}

function spectrum({ spectra, desired, document }: DesignResult): SpectrumView {
  const frequencies = spectra.averages === 0 ? new Float64Array(0) : spectra.frequencies;
  if (frequencies.length === 0) return { frequencies, lines: [] };
  const cleaned = document.job === 'cancel' ? 'cleaned signal e' : 'error e';
  return {
    frequencies,
    lines: [
      { label: `desired ${signalName(desired)}`, role: 'desired', valuesDb: decibelsOf(spectra.desired) },
      { label: 'output y', role: 'output', valuesDb: decibelsOf(spectra.output) },
      { label: cleaned, role: 'error', valuesDb: decibelsOf(spectra.error) },
    ],
  };
}

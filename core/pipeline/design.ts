import { residualFindings } from '../confidence/residualFindings';
import { bandFigures } from '../evaluation/bandFigures';
import { checkLimits } from '../evaluation/limits';
import type { MeasuredRuns } from '../evaluation/measuredRuns';
import { rough } from '../figures/numbers';
import { type Finding, finding, Refusal, worstFirst } from '../findings/finding';
import { overflowFindings } from '../numbers/overflowFindings';
import { type TargetFilter, targetInput } from '../numbers/targetFilter';
import { type TestVectors, testVectors } from '../numbers/testVectors';
import { noMeans, signalReader } from '../pair/signals';
import { unprovenGain } from '../suitability/pair/unprovenGain';
import { arithmeticResult } from './arithmeticResult';
import { choiceLines } from './choiceLines';
import { confidenceOf } from './confidence';
import type { DesignResult } from './designResult';
import { type Fit, fitPair } from './fitPair';
import type { Host } from './host';
import { inspectPair, type PairInspection } from './inspectPair';
import { type Measured, measure } from './measure';
import { type DocumentPlace, type Pairing, type ReadPairing, readPairing } from './pairing';
import { gainFindings, shapeResult } from './shapeResult';
import { confidenceKey, measureKey } from './stageKeys';
import { studyWords } from './studyWords';
import { recordingSummaries, takeSummaries } from './summaries';
import { type Target, toTarget } from './toTarget';

/** A design, or the findings that stopped it (and those found on the way), worst first. */
export interface Designed {
  result: DesignResult | null;
  findings: Finding[];
}

/** Told as the stages come, for those who show them one by one. */
export interface DesignWatch {
  read?(read: ReadPairing): void;
  measured?(pairing: Pairing, fit: Fit, measured: Measured): void;
  inspected?(inspection: PairInspection): void;
  /** All but `choice`, which is still null. */
  evaluated?(result: DesignResult): void;
}

/** A solution in doubles, in the target's numbers, and what both are worth. */
export interface Solved {
  fit: Fit;
  target: Target;
  measured: Measured;
}

/** Condition number from which the taps are called ill-conditioned: they keep about six digits (common practice). */
const illConditioned = 1e10;

/**
 * The whole job on one document: read, pair, statistics, solution, evaluation, number format.
 * Bad input never throws: it comes back as findings, with `result` null where one of them is a blocker.
 */
export async function design(
  host: Host,
  text: string,
  place: DocumentPlace,
  watch: DesignWatch = {},
): Promise<Designed> {
  const findings: Finding[] = [];
  try {
    const read = await readPairing(host, text, place);
    findings.push(...read.findings);
    watch.read?.(read);
    if (read.pairing === null) return { result: null, findings: worstFirst(findings) };
    const { pairing } = read;
    const fit = await fitPair(pairing, host);
    const target = await toTarget(pairing, fit, host);
    const measured = await measure(pairing, fit, target, host);
    watch.measured?.(pairing, fit, measured);
    const inspection = await inspectPair(pairing, fit.moments.means, findings, host);
    watch.inspected?.(inspection);
    const figures = await evaluateDesign(
      host,
      pairing,
      place,
      { fit, target, measured },
      findings,
      inspection,
    );
    watch.evaluated?.(figures);
    const result = { ...figures, choice: await choiceLines(pairing, host) };
    return { result, findings: result.findings };
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    return { result: null, findings: worstFirst([...findings, ...error.findings]) };
  }
}

/**
 * Figures of a solution and its target numbers, as everything that is written needs them.
 * @param inspection of the pair; null where only the figures are asked for
 */
export async function evaluateDesign(
  host: Host,
  pairing: Pairing,
  place: DocumentPlace,
  { fit, target, measured }: Solved,
  earlier: readonly Finding[],
  inspection: PairInspection | null,
): Promise<DesignResult> {
  const { document, takes, sampleRate } = pairing;
  const { filter } = fit;
  const { heldOut, proved, runs, evaluation } = measured;
  const shape = await shapeResult(pairing, fit, target.filter, runs, evaluation.total.nmseDb, host.pace);
  const confidence = await host.keep('confidence', confidenceKey(pairing), () =>
    confidenceOf(pairing, fit, host.pace),
  );
  const summaries = takeSummaries(takes);
  const inputs = summaries[0].inputs.map(({ channel }) => channel);
  const trustworthy = document.job !== 'cancel' || heldOut.disturbanceOnly;
  const findings = [
    ...earlier,
    ...(inspection === null
      ? []
      : [
          ...inspection.findings,
          ...unprovenGain(filter.coefficients, inspection.excitation, sampleRate, takes[0]),
        ]),
    ...proofFindings(pairing, fit, heldOut),
    ...residualFindings(confidence.residuals, inputs, document.filter.length),
    ...overflowFindings(target.filter, evaluation.target),
    ...gainFindings(pairing, shape),
    ...checkLimits(document.limits, {
      takes: proved ? evaluation.takes : null,
      target: proved ? evaluation.target : null,
      trustworthy,
    }),
  ];
  return {
    document,
    documentFile: place.file,
    documentSha256: pairing.documentSha256,
    sampleRate,
    recordings: recordingSummaries(pairing),
    takes: summaries,
    inputs,
    desired: summaries[0].desired.channel,
    coefficients: [...filter.coefficients],
    means: filter.means,
    inputPowers: fit.moments.inputPowers,
    method: fit.solution.method,
    conditionNumber: fit.solution.conditionNumber,
    fit: measured.fit,
    confidence,
    inspection,
    heldOut: proved
      ? {
          ...evaluation.total,
          outsideBandDb: evaluation.outsideBandDb,
          disturbanceOnly: heldOut.disturbanceOnly,
          bands: bandFigures(evaluation.spectra),
          takes: evaluation.takes,
        }
      : null,
    spectra: evaluation.spectra,
    choice: null,
    arithmetic: arithmeticResult(target.filter, evaluation.target, pairing),
    shape,
    words: await host.keep('words', measureKey(pairing), () =>
      studyWords(fit, target, document.arithmetic.rounding, runs, host.pace),
    ),
    vectors: await vectorsFrom(runs, pairing, fit, target.filter),
    findings: worstFirst(findings),
  };
}

function proofFindings({ document, takes }: Pairing, { solution }: Fit, heldOut: MeasuredRuns): Finding[] {
  const findings: Finding[] = [];
  if (heldOut.runs.length === 0) findings.push(finding('no-held-out', {}, { path: ['takes', 0] }));
  else if (document.job === 'cancel' && !heldOut.disturbanceOnly) {
    findings.push(finding('no-disturbance-only', {}, { path: ['takes', 0] }));
  }
  for (const name of heldOut.leftOut) {
    const t = takes.findIndex((take) => take.name === name);
    findings.push(finding('no-disturbance-only', {}, { take: name, path: ['takes', t] }));
  }
  if (solution.conditionNumber > illConditioned) {
    findings.push(
      finding(
        'ill-conditioned',
        { condition: rough(solution.conditionNumber) },
        { path: ['filter', 'regularisation'] },
      ),
    );
  }
  return findings;
}

async function vectorsFrom(
  runs: MeasuredRuns['runs'],
  { document }: Pairing,
  { filter }: Fit,
  target: TargetFilter,
): Promise<TestVectors> {
  const { take, segments } = runs[0];
  const none = noMeans(take.inputs.length);
  const read = signalReader(take, { means: none, delay: filter.delay });
  const { from, to } = segments[0];
  const raw = await read(from, Math.min(to, from + document.write.testVectors));
  return testVectors(
    target,
    raw.inputs.map((samples, r) => targetInput(target, r, samples)),
  );
}

import type { TapsFile } from '../files/readTaps';
import { type Finding, finding, Refusal, worstFirst } from '../findings/finding';
import type { TargetFilter } from '../numbers/targetFilter';
import { evaluateDesign } from './design';
import type { DesignResult } from './designResult';
import { type Fit, fitPair } from './fitPair';
import type { Host } from './host';
import { measure } from './measure';
import { type DocumentPlace, type Pairing, readPairing } from './pairing';
import { targetFormat, targetScaling } from './targetFormat';
import type { Target } from './toTarget';
import { readWritten, staleness } from './writtenFiles';

/** What a check came to. */
export interface Checked {
  /** `bad-input`: nothing could be told; `failed`: stale, edited, different or over a limit. */
  state: 'current' | 'failed' | 'bad-input';
  /** The result found again; null where it was not computed. */
  result: DesignResult | null;
  findings: Finding[];
}

/**
 * Whether what was written still holds: digests of document, recordings and files, then the solution again, and the
 * written integers run again (not rounded again) for the limits. Writes nothing.
 */
export async function check(host: Host, text: string, place: DocumentPlace): Promise<Checked> {
  const findings: Finding[] = [];
  try {
    const read = await readPairing(host, text, place);
    findings.push(...read.findings);
    if (read.pairing === null) return { state: 'bad-input', result: null, findings: worstFirst(findings) };
    const written = await readWritten(host, read.pairing.document, place);
    const stale = [...written.findings];
    if (written.taps !== null) {
      const digests = new Map([...read.pairing.recordings].map(([file, { sha256 }]) => [file, sha256]));
      stale.push(...staleness(read.pairing.documentSha256, digests, written.taps, written.file));
    }
    if (written.taps === null || stale.length > 0) {
      return { state: 'failed', result: null, findings: worstFirst([...findings, ...stale]) };
    }
    const fit = await fitPair(read.pairing, host);
    const different = compareTaps(fit, written.taps, written.file);
    const target = writtenTarget(read.pairing, fit, written.taps);
    const measured = await measure(read.pairing, fit, target, host);
    const result = await evaluateDesign(host, read.pairing, place, { fit, target, measured }, findings, null);
    different.push(...compareFigures(result, written.taps, written.file));
    const failed = different.length > 0 || result.findings.some((f) => f.code === 'over-limit');
    return {
      state: failed ? 'failed' : 'current',
      result,
      findings: worstFirst([...different, ...result.findings]),
    };
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    return { state: 'bad-input', result: null, findings: worstFirst([...findings, ...error.findings]) };
  }
}

/** Taps must agree within what the solver keeps: about 1e-14 times the condition number. */
function compareTaps({ filter, solution }: Fit, taps: TapsFile, file: string): Finding[] {
  let gap = 0;
  let size = 0;
  const sameShape =
    taps.coefficients.length === filter.coefficients.length &&
    taps.coefficients[0].length === filter.coefficients[0].length;
  if (sameShape) {
    filter.coefficients.forEach((row, r) => {
      row.forEach((w, k) => {
        gap += (w - taps.coefficients[r][k]) * (w - taps.coefficients[r][k]);
        size += w * w;
      });
    });
  }
  const relative = Math.sqrt(gap / size);
  const allowed = Math.max(1e-12, 1e-14 * solution.conditionNumber);
  if (sameShape && (relative <= allowed || gap === 0)) return [];
  const got = sameShape
    ? `a relative difference of ${Number(relative.toPrecision(2))}`
    : 'another number of taps';
  const expected = sameShape ? `at most ${Number(allowed.toPrecision(2))}` : 'as many as are written';
  return [finding('different', { what: 'the taps', got, expected }, { file })];
}

/** The written integers; without a rounder, so that no other words are tried. */
function writtenTarget(pairing: Pairing, fit: Fit, taps: TapsFile): Target {
  const { word, fractionBits, values } = taps.arithmetic;
  const filter: TargetFilter = {
    values,
    scaling: targetScaling(pairing, fit.filter.means),
    format: typeof word === 'string' ? word : targetFormat(pairing.document.arithmetic, fractionBits ?? 0),
  };
  return { filter, rounder: null };
}

/** Shown figures must agree to their last shown digit, give or take one. */
function compareFigures(result: DesignResult, taps: TapsFile, file: string): Finding[] {
  const findings: Finding[] = [];
  const compare = (what: string, got: number | null, expected: number | null) => {
    if (got === null || expected === null || Math.abs(got - expected) <= 0.0151) return;
    findings.push(
      finding('different', { what, got: `${got.toFixed(2)} dB`, expected: `${expected} dB` }, { file }),
    );
  };
  compare('the held-out NMSE', result.heldOut?.nmseDb ?? null, taps.heldOutNmseDb);
  compare(
    'the held-out NMSE of the written integers',
    result.arithmetic.heldOutNmseDb,
    taps.arithmetic.heldOutNmseDb,
  );
  return findings;
}

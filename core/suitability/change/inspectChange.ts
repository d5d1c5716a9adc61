import type { PairingDocument } from '../../document/pairingDocument';
import { type Finding, finding } from '../../findings/finding';
import type { FindingCode } from '../../findings/sentences';
import type { Pace } from '../../pace';
import type { Means } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { crosstalkFinding } from './changeFindings';
import { type Crosstalk, crosstalk } from './crosstalk';
import { stationarityFindings } from './stationarity';

/**
 * What changes along the recordings: power and response (for any job) and, for `cancel`, what the wanted signal
 * changes. Reads some tens of windows of each take, however long it is.
 * @param means as the fit takes them off
 * @param earlier findings that are there already: `drift` of a take says why its response changes, and
 *   `no-disturbance-only` asks for the very recording that `crosstalk-unknown` would ask for
 * @returns `crosstalk` is null for other jobs and where it cannot be told
 * @throws Refusal `not-finite-used` where a window holds NaN or infinite samples
 */
export async function inspectChange(
  takes: readonly Take[],
  document: PairingDocument,
  means: Means,
  pace: Pace,
  earlier: readonly Finding[] = [],
): Promise<{ crosstalk: Crosstalk | null; findings: Finding[] }> {
  const said = (code: FindingCode, take?: Take) =>
    earlier.some((found) => found.code === code && (take === undefined || found.take === take.name));
  const findings = await stationarityFindings(takes, document, means, pace, (take) => said('drift', take));
  if (document.job !== 'cancel' || takes.length === 0) return { crosstalk: null, findings };

  const told = await crosstalk(takes, document, means, pace);
  if (told === null) {
    if (!said('no-disturbance-only')) {
      findings.push(finding('crosstalk-unknown', {}, { path: ['takes', 0] }));
    }
  } else if (told.proved) findings.push(crosstalkFinding(told));
  return { crosstalk: told, findings };
}

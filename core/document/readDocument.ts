import { blocked, type Finding, finding, worstFirst } from '../findings/finding';
import { type At, type Check, newAt, orNull } from './checks/check';
import { describe } from './checks/describe';
import { type Keys, objectOf } from './checks/keys';
import { positiveUpTo } from './checks/numbers';
import { label, oneOf } from './checks/texts';
import { documentVersion, jobs, type PairingDocument } from './pairingDocument';
import { parseJson } from './parseJson';
import { arithmetic } from './sections/arithmetic';
import { filter } from './sections/filter';
import { limits } from './sections/limits';
import { highestRate, prepare } from './sections/prepare';
import { takes } from './sections/takes';
import { write } from './sections/write';

/** The title where none is given, or an empty one. */
export const defaultTitle = 'Untitled filter';

/** Findings told at most; a document that has more is better read again after these. */
const mostFindings = 100;

/**
 * Reads a pairing document: strict JSON (RFC 8259, without repeated keys, up to 4 MiB), every key checked, defaults
 * filled in. All that is wrong is found in one go; each finding has the `path` of its value, and for broken JSON and
 * repeated keys the `line` and `column` (from 1) among its values. Unknown keys are notes.
 * What only the recordings can tell (channels, ends and overlaps of intervals, the root) is checked elsewhere.
 * @returns the document, or null where a finding is a blocker
 */
export function readDocument(text: string): { document: PairingDocument | null; findings: Finding[] } {
  const { value, findings } = parseJson(text);
  if (blocked(findings)) return { document: null, findings: foremost(findings) };
  const document = checkDocument(value, newAt(findings)) ?? null;
  return { document: blocked(findings) ? null : document, findings: foremost(findings) };
}

function checkDocument(value: unknown, at: At): PairingDocument | undefined {
  const other = otherVersion(value);
  if (other !== undefined) return at.inside('pairing').report('version-unknown', other);
  return objectOf(readKeys)(value, at);
}

/** Of another version nothing is known, its other keys included. */
function otherVersion(value: unknown): { got: string; expected: number } | undefined {
  if (typeof value !== 'object' || value === null || !('pairing' in value)) return undefined;
  if (value.pairing === documentVersion) return undefined;
  return { got: describe(value.pairing), expected: documentVersion };
}

function readKeys(keys: Keys): PairingDocument | undefined {
  // For editors that find the schema by it; it means nothing here.
  keys.optional('$schema', (given) => given, null);
  if (keys.optional('pairing', (given) => given, null) === null) {
    keys.at.inside('pairing').report('version-missing', { expected: documentVersion });
  }
  const titleText = keys.optional('title', title, defaultTitle);
  const job = keys.required('job', oneOf(jobs));
  const sampleRate = keys.optional('sampleRate', orNull(positiveUpTo(highestRate)), null);
  const takeEntries = keys.required('takes', takes);
  const inputs = takeEntries?.[0].inputs.length ?? null;
  const sections = {
    prepare: keys.section('prepare', prepare),
    filter: keys.section('filter', filter(job ?? 'cancel', inputs)),
    arithmetic: keys.section('arithmetic', arithmetic(inputs)),
    write: keys.section('write', write(titleText)),
    limits: keys.section('limits', limits),
  };
  if (job === undefined || takeEntries === undefined) return undefined;
  return { title: titleText, job, sampleRate, takes: takeEntries, ...sections };
}

const title: Check<string> = (value, at) => (value === '' ? defaultTitle : label(value, at));

/** The weightiest findings, and how many more there are. */
function foremost(findings: readonly Finding[]): Finding[] {
  const sorted = worstFirst(findings);
  if (sorted.length <= mostFindings) return sorted;
  const more = finding('more-findings', { count: sorted.length - mostFindings }, { path: [] });
  return [...sorted.slice(0, mostFindings), more];
}

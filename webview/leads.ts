import type { Interval } from '../core/pair/intervals';
import type { FindingView, FormView, TakeView } from '../core/protocol/views';
import { nearestPlace, type Path } from './paths';

/** Where on the page a finding leads. */
export type Lead =
  | { kind: 'field'; path: Path }
  /** A field of a take that may not be the one that is looked at. */
  | { kind: 'take'; take: number; path: Path }
  | { kind: 'lanes'; take: number; span: Interval }
  | { kind: 'anchor'; anchor: string }
  | { kind: 'text'; position: { line: number; column: number } };

/** Places named by what a finding is about, where neither a value nor samples say it. */
const anchors: Record<string, string> = {
  'low-coherence': 'coherence',
  'attainable-unknown': 'coherence',
  'noisy-input': 'coherence',
  'noisy-input-possible': 'coherence',
  'unproven-gain': 'coherence',
  'poor-excitation': 'spectra',
  'spectral-null': 'spectra',
  mains: 'spectra',
  lag: 'timing',
  drift: 'timing',
  acausal: 'timing',
  crosstalk: 'timing',
  'crosstalk-unknown': 'timing',
  'non-stationary': 'timing',
  clipped: 'levels',
  stuck: 'levels',
  dropout: 'levels',
  offset: 'levels',
  'low-level': 'levels',
  'identical-channels': 'levels',
  'length-differs': 'levels',
  'taps-missing': 'impulse',
  'delay-missing': 'leftOver',
  'no-disturbance-only': 'intervals',
  'no-held-out': 'intervals',
  'limit-not-tested': 'figures',
  'over-limit': 'figures',
  'ill-conditioned': 'figures',
  overflow: 'overflow',
  'overflow-possible': 'overflow',
  'coefficient-too-large': 'overflow',
  'few-blocks': 'choice',
  'longest-is-best': 'choice',
  'delay-at-the-end': 'choice',
  'choice-hidden': 'choice',
  'choice-of-free-taps': 'choice',
  'suggestion-unsolvable': 'choice',
};

/** Values that a finding is about without having a place in the document. */
const values: Record<string, Path> = {
  'foreign-file': ['write', 'folder'],
  'not-writable': ['write', 'folder'],
};

/**
 * Its field, its samples, its plot or table, or its place in the text, whichever comes first; null where it has none.
 * @param fields paths of the fields on the page
 * @param has true where the page shows something under that anchor
 */
export function leadOf(
  found: FindingView,
  fields: Iterable<Path>,
  takes: readonly TakeView[],
  has: (anchor: string) => boolean,
): Lead | null {
  if (found.span !== null) {
    const take = takeOf(found, takes);
    if (take >= 0) return { kind: 'lanes', take, span: found.span };
  }
  if (found.path !== null && found.path.length > 0) {
    const [list, take] = found.path;
    if (list === 'takes' && typeof take === 'number') return { kind: 'take', take, path: found.path };
    const path = nearestPlace(fields, found.path);
    if (path !== null) return { kind: 'field', path };
  }
  const value = Object.hasOwn(values, found.code) ? nearestPlace(fields, values[found.code]) : null;
  if (value !== null) return { kind: 'field', path: value };
  const anchor = anchors[found.code];
  if (anchor !== undefined && has(anchor)) return { kind: 'anchor', anchor };
  return found.position === null ? null : { kind: 'text', position: found.position };
}

function takeOf({ take, file }: FindingView, takes: readonly TakeView[]): number {
  if (take !== null) return takes.findIndex(({ name }) => name === take);
  return file === null ? -1 : takes.findIndex(({ tracks }) => tracks.some((track) => track.file === file));
}

/** The same findings, those about a whole file that cannot be used with the path of the first signal that names it. */
export function pathsOf(findings: readonly FindingView[], form: FormView | null): FindingView[] {
  return findings.map((found) => {
    const { file, severity, span } = found;
    const hasPath = found.path !== null && found.path.length > 0;
    if (form === null || file === null || hasPath || severity !== 'blocker' || span !== null) return found;
    const path = trackPath(form, file);
    return path === null ? found : { ...found, path };
  });
}

function trackPath(form: FormView, file: string): (string | number)[] | null {
  for (const [take, { inputs, desired }] of form.document.takes.entries()) {
    const input = inputs.findIndex((track) => track.file === file);
    if (input >= 0) return ['takes', take, 'inputs', input];
    if (desired.file === file) return ['takes', take, 'desired'];
  }
  return null;
}

/** Codes that lead to an anchor. */
export function anchorCodes(): string[] {
  return Object.keys(anchors);
}

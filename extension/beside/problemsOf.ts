import { pathIn, resolveInside } from '../../core/document/paths';
import { visible } from '../../core/figures/visible';
import { type Dictionary, translatedText } from '../../core/findings/translate';
import { translatedPhrase } from '../../core/findings/translatePhrase';
import { holdsArray } from './generatedNames';
import { type Entry, standingOf } from './standing';
import type { Translate } from './words';

/** Something that is wrong with a pairing or with what was written from it, and where it is to be shown. */
export interface Problem {
  /** Path from the root of the file that it is shown in. */
  path: string;
  /** `array`: where the file begins its array of taps; otherwise line and column, from 1. */
  at: 'array' | { line: number; column: number };
  severity: 'error' | 'warning';
  code: string;
  text: string;
  /** Address of the pairing document. */
  document: string;
  /** The recording that is missing, as the document names it; null for anything else. */
  missing: string | null;
}

/**
 * What is to be shown of a pairing. A pairing that was never written, and cautions, are no problems.
 * @param dictionary translations of findings by their English
 */
export function problemsOf(entry: Entry, t: Translate, dictionary: Dictionary = {}): Problem[] {
  const { view } = entry;
  return view === null
    ? []
    : [...ofFiles(entry, view, t, dictionary), ...ofDocument(entry, view, dictionary)];
}

type View = NonNullable<Entry['view']>;

/** At the arrays, or where nothing holds one in the taps file. */
function ofFiles(entry: Entry, view: View, t: Translate, dictionary: Dictionary): Problem[] {
  const { document, folder, checked, file } = entry;
  if (view.tapsFile === null) return [];
  const arrays = view.others.filter(holdsArray);
  const problem = (path: string, code: string, text: string, severity: Problem['severity'] = 'warning') =>
    ({ path, at: 'array', severity, code, text, document, missing: null }) as const;
  const everywhere = (code: string, text: string, severity?: Problem['severity']) =>
    (arrays.length > 0 ? arrays : [view.tapsFile!]).map((path) => problem(path, code, text, severity));
  const problems: Problem[] = [];
  for (const { code, file: named } of view.findings) {
    const path = named === null ? null : resolveInside(folder, named);
    if (code === 'edited' && path !== null) {
      problems.push(
        problem(path, code, t('The file is not as it was written: edited by hand, or from another run.')),
      );
    } else if (code === 'missing-output') {
      problems.push(
        ...everywhere(code, t('{0} was written with this file and is gone.', visible(named ?? ''))),
      );
    } else if (code === 'stale-recording') {
      problems.push(
        ...everywhere(
          code,
          t('The recording {0} is not the one that the taps were made from.', visible(named ?? '')),
        ),
      );
    } else if (code === 'stale-document') {
      problems.push(...everywhere(code, t('{0} has changed since the taps were made.', visible(file))));
    }
  }
  const standing = standingOf(entry);
  if (standing === 'over-limit' || standing === 'different') {
    const found = (checked ?? []).filter(({ code }) => code === standing);
    const texts =
      found.length > 0
        ? found.map((one) => translatedText(one, dictionary))
        : view.overLimit.map((text) => visible(translatedPhrase(text, dictionary)));
    for (const text of texts) problems.push(...everywhere(standing, text, 'error'));
  }
  return problems;
}

/** Blockers that have their place in the document. */
function ofDocument(
  { document, folder, file, checked }: Entry,
  view: View,
  dictionary: Dictionary,
): Problem[] {
  const path = pathIn(folder, file);
  const known = new Set<string>();
  const problems: Problem[] = [];
  for (const found of [...view.findings, ...(checked ?? [])]) {
    const { code, severity, position, text } = found;
    if (severity !== 'blocker' || position === null || elsewhere.includes(code)) continue;
    const key = JSON.stringify([code, position, text]);
    if (known.has(key)) continue;
    known.add(key);
    const missing = code === 'missing-file' ? found.file : null;
    const sentence = translatedText(found, dictionary);
    const said = found.file === null ? sentence : `${visible(found.file)}: ${sentence}`;
    problems.push({ path, at: position, severity: 'error', code, text: said, document, missing });
  }
  return problems;
}

/** Shown at the files, or not at all. */
const elsewhere = [
  'not-written',
  'edited',
  'missing-output',
  'stale-recording',
  'stale-document',
  'different',
  'over-limit',
];

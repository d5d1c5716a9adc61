import { parseJson } from '../../core/document/parseJson';
import { readDocument } from '../../core/document/readDocument';
import type { FindingView, FormView } from '../../core/protocol/views';
import { findingView } from '../../core/view/findingView';

/** What the page's form shows of a text, and what is wrong with it. */
export interface DocumentView {
  /** Null where the text cannot be read. */
  form: FormView | null;
  findings: FindingView[];
}

/** Reads a document for the form. */
export function documentView(text: string): DocumentView {
  const { document, findings } = readDocument(text);
  return {
    form: document === null ? null : { document, given: givenPaths(parseJson(text).value) },
    findings: findings.map((found) => findingView(found, text)),
  };
}

/** Paths of all that a value holds, joined by `/`, parents before what they hold. */
export function givenPaths(value: unknown, path = ''): string[] {
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, item]) => {
    const below = path === '' ? key : `${path}/${key}`;
    return [below, ...givenPaths(item, below)];
  });
}

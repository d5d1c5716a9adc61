import type { PageState } from './state';

const broken = ['broken-json', 'document-too-large', 'document-too-deep', 'duplicate-key', 'version-unknown'];

/** True where the text is no document that the form could be edited into: only the text editor can mend it. */
export function isBroken({ readable, findings }: PageState): boolean {
  return !readable && findings.some(({ code }) => broken.includes(code));
}

/** Keys that a document without recordings still lacks; null where it has its takes. */
export function missingKeys({ form, readable, findings }: PageState): string[] | null {
  if (form !== null && readable) return form.document.takes.length === 0 ? [] : null;
  const blockers = findings.filter(({ severity }) => severity === 'blocker');
  const faulty =
    (key: string) =>
    ({ code, text, path }: (typeof blockers)[number]) =>
      (path?.length === 1 && path[0] === key) ||
      (code === 'missing-key' && path?.length === 0 && new RegExp(`\\b${key}\\b`).test(text));
  if (!blockers.some(faulty('takes'))) return null;
  const missing = ['job'].filter((key) => blockers.some(faulty(key)));
  return blockers.some(({ code }) => code === 'version-missing') ? ['pairing', ...missing] : missing;
}

import { locateFinding } from '../document/locate';
import { visible } from '../figures/visible';
import type { Finding, Severity } from './finding';
import { sayWithPlace } from './say';

const words: Record<Severity, string> = { blocker: 'error', caution: 'warning', note: 'note' };

/**
 * A finding as one line for terminals and problem matchers: `FILE:LINE:COL: error|warning|note: TEXT [CODE]`.
 * @param document name of the pairing document, for findings that have their place in it
 * @param text of the document; null where there is none to look places up in
 */
export function problemLine(found: Finding, document: string, text: string | null): string {
  const end = `${words[found.severity]}: ${visible(sayWithPlace(found))} [${found.code}]`;
  if (found.path === undefined && found.file !== undefined) {
    const { file, line, ...rest } = found;
    const bare = `${words[found.severity]}: ${visible(sayWithPlace(rest))} [${found.code}]`;
    return `${visible(file)}:${line ?? 1}:1: ${bare}`;
  }
  const at = text === null ? { line: 1, column: 1 } : locateFinding(text, found);
  return `${visible(document)}:${at.line}:${at.column}: ${end}`;
}

import { visible } from '../../core/figures/visible';
import type { FindingView } from '../../core/protocol/views';

const words = { blocker: 'error', caution: 'warning', note: 'note' } as const;

/**
 * A finding as one line for terminals, as the command line prints it and the problem matcher of the manifest reads it:
 * `FILE:LINE:COL: error|warning|note: TEXT [CODE]`. Always English.
 * @param document path of the pairing document from the workspace folder
 */
export function problemText(found: FindingView, document: string): string {
  const { position, file, place, text, severity, code } = found;
  const says = `${words[severity]}: ${place === '' ? text : `${place}: ${text}`} [${code}]`;
  if (position !== null) return `${visible(document)}:${position.line}:${position.column}: ${says}`;
  const folder = document.slice(0, document.lastIndexOf('/') + 1);
  return `${visible(file === null ? document : folder + file)}:1:1: ${says}`;
}

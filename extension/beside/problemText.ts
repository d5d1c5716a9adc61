import { visible } from '../../core/figures/visible';
import type { FindingView } from '../../core/protocol/views';

const words = { blocker: 'error', caution: 'warning', note: 'note' } as const;

/**
 * A finding as one line for terminals, as the command line prints it and the problem matcher of the manifest reads it:
 * `FILE:LINE:COL: error|warning|note: TEXT [CODE]`. Always English.
 * @param document path of the pairing document from the workspace folder
 */
export function problemText(found: FindingView, document: string): string {
  const { position, file, place } = found;
  if (position !== null || file === null) {
    const { line, column } = position ?? { line: 1, column: 1 };
    return `${visible(document)}:${line}:${column}: ${says(found, place)}`;
  }
  const folder = document.slice(0, document.lastIndexOf('/') + 1);
  // File and line stand in front and need not be said again.
  const inFile = withoutStart(place, visible(file));
  const line = /^line (\d+)/.exec(inFile);
  const rest = line === null ? inFile : withoutStart(inFile, line[0]);
  return `${visible(folder + file)}:${line?.[1] ?? 1}:1: ${says(found, rest)}`;
}

function says({ severity, text, code }: FindingView, place: string): string {
  return `${words[severity]}: ${place === '' ? text : `${place}: ${text}`} [${code}]`;
}

/** The rest of a place, whose parts are joined by commas. */
function withoutStart(place: string, start: string): string {
  if (place === start) return '';
  return place.startsWith(`${start}, `) ? place.slice(start.length + 2) : place;
}

import type { Change } from '../../core/protocol/messages';
import { jsonChange, type TextChange } from './jsonChange';
import { styleOf } from './textStyle';

/** A stretch of the old text that is still there, or new text. */
type Piece = { from: number; to: number } | { text: string };

/**
 * The smallest edits of a text that together make the changes, in the text's own indent and line ends: from front to back,
 * without overlap, with places of the text as it is. Keys that nobody knows and the layout of everything else stay.
 * @param text valid JSON
 */
export function minimalEdits(text: string, changes: readonly Change[]): TextChange[] {
  const style = styleOf(text);
  let pieces: Piece[] = [{ from: 0, to: text.length }];
  for (const change of changes) {
    const now = pieces.map((piece) => textOf(text, piece)).join('');
    const edit = jsonChange(now, change, style);
    if (edit !== null) pieces = applied(text, pieces, edit);
  }
  return hunks(pieces, text.length)
    .map((edit) => trimmed(text, edit))
    .filter(({ length, text: made }) => length > 0 || made !== '');
}

/** What edits with places of the text as it is make of it. */
export function editedText(text: string, edits: readonly TextChange[]): string {
  let at = 0;
  const parts: string[] = [];
  for (const { offset, length, text: made } of edits) {
    parts.push(text.slice(at, offset), made);
    at = offset + length;
  }
  return parts.join('') + text.slice(at);
}

function textOf(text: string, piece: Piece): string {
  return 'text' in piece ? piece.text : text.slice(piece.from, piece.to);
}

/** The pieces after an edit that counts in the text that they make. */
function applied(text: string, pieces: readonly Piece[], edit: TextChange): Piece[] {
  const result: Piece[] = [];
  let at = 0;
  let placed = false;
  for (const piece of pieces) {
    const length = textOf(text, piece).length;
    const before = Math.min(length, Math.max(0, edit.offset - at));
    const after = Math.min(length, Math.max(0, edit.offset + edit.length - at));
    if (before > 0) result.push(part(piece, 0, before));
    if (!placed && edit.offset <= at + length) {
      result.push({ text: edit.text });
      placed = true;
    }
    if (after < length) result.push(part(piece, after, length));
    at += length;
  }
  return result;
}

function part(piece: Piece, from: number, to: number): Piece {
  return 'text' in piece
    ? { text: piece.text.slice(from, to) }
    : { from: piece.from + from, to: piece.from + to };
}

/** What stands between the stretches that are still there. */
function hunks(pieces: readonly Piece[], length: number): TextChange[] {
  const result: TextChange[] = [];
  let at = 0;
  let made = '';
  for (const piece of [...pieces, { from: length, to: length }]) {
    if ('text' in piece) made += piece.text;
    else {
      if (made !== '' || piece.from > at) result.push({ offset: at, length: piece.from - at, text: made });
      at = piece.to;
      made = '';
    }
  }
  return result;
}

/** Without what is the same at both ends; a line end of two characters is never cut. */
function trimmed(text: string, { offset, length, text: made }: TextChange): TextChange {
  const old = text.slice(offset, offset + length);
  const shorter = Math.min(old.length, made.length);
  let start = 0;
  while (start < shorter && old[start] === made[start]) start++;
  if (text[offset + start - 1] === '\r' && start > 0) start--;
  let end = 0;
  while (end < shorter - start && old[old.length - 1 - end] === made[made.length - 1 - end]) end++;
  if (end > 0 && old[old.length - end] === '\n') end--;
  return {
    offset: offset + start,
    length: length - start - end,
    text: made.slice(start, made.length - end),
  };
}

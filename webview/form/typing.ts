/** What a text field holds while it is typed into: the document's text, and the user's until it is committed. */
export interface Typing {
  /** As the document has it. */
  kept: string;
  /** As it stands in the field. */
  typed: string;
  focused: boolean;
  /** The typed text was refused. */
  wrong: boolean;
}

export function newTyping(): Typing {
  return { kept: '', typed: '', focused: false, wrong: false };
}

/** True where the field has text that the document does not. */
export function isOpen({ kept, typed }: Typing): boolean {
  return kept !== typed;
}

/** A document came: its text shows unless the user is in the middle of another, or was refused and has not changed it. */
export function fill(state: Typing, text: string): Typing {
  const same = text === state.kept;
  if (isOpen(state) && (state.focused || (state.wrong && same))) return { ...state, kept: text };
  return { ...state, kept: text, typed: text, wrong: false };
}

/** The user took the text back. */
export function restore(state: Typing): Typing {
  return { ...state, typed: state.kept, wrong: false };
}

/** True where undo belongs to the field: the browser takes back what was typed, the document keeps out of it. */
export function ownsUndo(state: Typing, { key, ctrlKey, metaKey, altKey }: Keys): boolean {
  const undoes = (ctrlKey || metaKey) && !altKey && ['z', 'y'].includes(key.toLowerCase());
  return undoes && isOpen(state);
}

interface Keys {
  key: string;
  ctrlKey: boolean;
  metaKey: boolean;
  altKey: boolean;
}

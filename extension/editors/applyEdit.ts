import * as vscode from 'vscode';
import type { Change } from '../../core/protocol/messages';
import { minimalEdits } from './minimalEdits';

/** Tries at most: the text can change between reading it and editing it. */
const mostTries = 3;

/** Makes the changes in the document by the smallest edits, in one undo step. Its text must be JSON. */
export async function applyChanges(document: vscode.TextDocument, changes: readonly Change[]): Promise<void> {
  for (let i = 0; i < mostTries; i++) {
    const edits = minimalEdits(document.getText(), changes);
    if (edits.length === 0) return;
    const whole = new vscode.WorkspaceEdit();
    for (const { offset, length, text } of edits) {
      const range = new vscode.Range(document.positionAt(offset), document.positionAt(offset + length));
      whole.replace(document.uri, range, text);
    }
    if (await vscode.workspace.applyEdit(whole)) return;
  }
  throw new Error(vscode.l10n.t('The document could not be changed. Is it read-only?'));
}

import * as vscode from 'vscode';

/** Shows a pairing as text, at a place of it. */
export async function openAsText(
  uri: vscode.Uri,
  position: { line: number; column: number } | null,
): Promise<null> {
  const at = position === null ? null : new vscode.Position(position.line - 1, position.column - 1);
  const options = at === null ? {} : { selection: new vscode.Range(at, at) };
  await vscode.commands.executeCommand('vscode.openWith', uri, 'default', options);
  return null;
}

/** Shows a pairing as its page. */
export async function openPageOf(uri: vscode.Uri): Promise<void> {
  await vscode.commands.executeCommand('vscode.openWith', uri, 'tapwright.pairing');
}

/** The file of the active editor, of whichever kind. */
export function activeFile(): vscode.Uri | null {
  const input = vscode.window.tabGroups.activeTabGroup.activeTab?.input;
  if (input instanceof vscode.TabInputCustom || input instanceof vscode.TabInputText) return input.uri;
  return null;
}

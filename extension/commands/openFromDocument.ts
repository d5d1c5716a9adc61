import * as vscode from 'vscode';
import { fromRoot, type Spot } from '../editors/spot';

/**
 * Opens a recording or a written file that lies in the document's root.
 * @param isRecording it is never opened as text
 */
export async function openFromDocument(spot: Spot, file: string, isRecording: boolean): Promise<null> {
  const uri = vscode.Uri.joinPath(spot.folderUri, file);
  if (fromRoot(spot, uri) === null) throw new Error(vscode.l10n.t('{0} lies outside the folder.', file));
  if (isRecording) await vscode.commands.executeCommand('vscode.openWith', uri, 'tapwright.recording');
  else await vscode.commands.executeCommand('vscode.open', uri);
  return null;
}

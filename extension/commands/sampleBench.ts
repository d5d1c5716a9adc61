import * as vscode from 'vscode';
import { openPageOf } from './openViews';

/** Files of `media/bench`, listed when the bundle is built: an extension's folder cannot be listed everywhere. */
declare const benchFiles: readonly string[];

const folderName = 'tapwright-bench';
const firstDocument = 'belt.pairing.json';

/** "Open Sample Bench": copies it into a new folder inside the one that the user chooses, and opens its first document. */
export async function openSampleBench(extensionUri: vscode.Uri): Promise<void> {
  const [parent] =
    (await vscode.window.showOpenDialog({
      title: vscode.l10n.t('Folder for the sample bench'),
      openLabel: vscode.l10n.t('Copy Here'),
      canSelectFiles: false,
      canSelectFolders: true,
      defaultUri: vscode.workspace.workspaceFolders?.[0]?.uri,
    })) ?? [];
  if (parent === undefined) return;
  const { fs } = vscode.workspace;
  const target = await freeFolder(parent);
  await fs.createDirectory(target);
  for (const file of benchFiles) {
    // Read and written: a copy between file systems is not offered by all.
    const bytes = await fs.readFile(vscode.Uri.joinPath(extensionUri, 'media', 'bench', file));
    await fs.writeFile(vscode.Uri.joinPath(target, file), bytes);
  }
  await openPageOf(vscode.Uri.joinPath(target, firstDocument));
}

/** A name that is not taken, so that nothing is overwritten. */
async function freeFolder(parent: vscode.Uri): Promise<vscode.Uri> {
  for (let i = 1; ; i++) {
    const target = vscode.Uri.joinPath(parent, i === 1 ? folderName : `${folderName}-${i}`);
    try {
      await vscode.workspace.fs.stat(target);
    } catch {
      return target;
    }
  }
}

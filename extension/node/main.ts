import { join } from 'node:path';
import type * as vscode from 'vscode';
import { start } from '../activate';
import { nodeDisk } from './nodeDisk';
import { nodeWorker } from './nodeWorker';

/** The entry of a Node host. */
export function activate(context: vscode.ExtensionContext): void {
  const local = (uri: vscode.Uri) => (uri.scheme === 'file' ? uri.fsPath : null);
  start(context, {
    startWorker: () => nodeWorker(join(context.extensionPath, 'dist', 'worker.js')),
    localFolder: local,
    disk(root, folder) {
      const [rootPath, folderPath] = [local(root), local(folder)];
      return rootPath === null || folderPath === null ? null : nodeDisk(rootPath, folderPath);
    },
  });
}

import * as vscode from 'vscode';
import { start } from '../activate';
import { webWorker } from './webWorker';

/** The entry of a host in the browser. */
export function activate(context: vscode.ExtensionContext): void {
  const script = vscode.Uri.joinPath(context.extensionUri, 'dist', 'web', 'worker.js').toString(true);
  start(context, {
    startWorker: (warn) => webWorker(script, warn),
    localFolder: () => null,
    disk: () => null,
  });
}

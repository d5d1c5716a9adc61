import type * as vscode from 'vscode';
import type { Log } from './log';
import type { Platform } from './platform';
import type { StatusBar } from './statusBar';
import type { WorkerClient } from './workerClient';

/** What editors and commands share. */
export interface Services {
  extensionUri: vscode.Uri;
  platform: Platform;
  worker: WorkerClient;
  log: Log;
  statusBar: StatusBar;
}

import type * as vscode from 'vscode';
import type { FindingView } from '../core/protocol/views';
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
  /** Told what the check of a saved document found. */
  checked?: (document: vscode.Uri, findings: FindingView[]) => void;
}

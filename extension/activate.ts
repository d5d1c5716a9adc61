import * as vscode from 'vscode';
import { registerBeside } from './beside/register';
import { registerCommands } from './commands/register';
import { OpenPairings } from './editors/openPairings';
import { PairingEditor, pairingView } from './editors/pairingEditor';
import { RecordingEditor, recordingViews } from './editors/recordingEditor';
import { hostCalls } from './files/hostCalls';
import { workspaceReader } from './files/workspaceReader';
import { newLog } from './log';
import type { Platform } from './platform';
import type { Services } from './services';
import { StatusBar } from './statusBar';
import { WorkerClient } from './workerClient';

/** Registers all that the extension offers. The worker is started when it is first needed. */
export function start(context: vscode.ExtensionContext, platform: Platform): void {
  const log = newLog();
  const statusBar = new StatusBar();
  const worker = new WorkerClient(
    () => platform.startWorker((text) => log.warn(text)),
    hostCalls(workspaceReader),
    (why) => log.error(`worker: ${why}`),
  );
  const services: Services = { extensionUri: context.extensionUri, platform, worker, log, statusBar };
  const pairings = new OpenPairings(services);
  const several = {
    supportsMultipleEditorsPerDocument: true,
    webviewOptions: { enableFindWidget: true },
  };
  const recordings = new RecordingEditor(services);
  context.subscriptions.push(
    log,
    statusBar,
    worker,
    pairings,
    vscode.window.registerCustomEditorProvider(pairingView, new PairingEditor(services, pairings), several),
    ...recordingViews.map((view) => vscode.window.registerCustomEditorProvider(view, recordings, several)),
    registerCommands(services, pairings, registerBeside(context, services, pairings)),
  );
}

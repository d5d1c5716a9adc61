import * as vscode from 'vscode';
import { pathIn } from '../../core/document/paths';
import type { PageCalls } from '../../core/protocol/messages';
import type { Services } from '../services';
import { type HostSession, newHostSession } from './hostSession';
import { hello, openPage, runCommand } from './page';
import { type Spot, spotOf } from './spot';

/** Default for files that no other editor shows, and a choice for those that have editors of their own. */
export const recordingViews = ['tapwright.recording', 'tapwright.otherRecording'] as const;

/** A recording that is open: read by the worker, never as a text document. */
class OpenRecording implements vscode.CustomDocument {
  readonly spot: Spot;
  readonly host: HostSession;
  private readonly watcher: vscode.FileSystemWatcher;

  constructor(
    readonly uri: vscode.Uri,
    services: Services,
  ) {
    this.spot = spotOf(uri, services.platform);
    const { root, folder, file } = this.spot;
    const path = pathIn(folder, file);
    this.host = newHostSession(services, file, (session, generation) =>
      services.worker.call.inspect({ session, generation, root, path, file }),
    );
    const pattern = new vscode.RelativePattern(this.spot.folderUri, '*');
    this.watcher = vscode.workspace.createFileSystemWatcher(pattern);
    const heard = (changed: vscode.Uri) => {
      if (changed.path === uri.path) this.begin();
    };
    this.watcher.onDidChange(heard);
    this.watcher.onDidCreate(heard);
    // Reading it again then says that it is gone.
    this.watcher.onDidDelete(heard);
    this.begin();
  }

  begin(): void {
    this.host.session.advance();
    this.host.session.run();
  }

  dispose(): void {
    this.watcher.dispose();
    this.host.dispose();
  }
}

/** The page of a recording by itself. */
export class RecordingEditor implements vscode.CustomReadonlyEditorProvider<OpenRecording> {
  constructor(private readonly services: Services) {}

  openCustomDocument(uri: vscode.Uri): OpenRecording {
    return new OpenRecording(uri, this.services);
  }

  resolveCustomEditor({ uri, spot, host }: OpenRecording, panel: vscode.WebviewPanel): void {
    const { worker, extensionUri } = this.services;
    const { id: session } = host;
    openPage(panel, extensionUri, (page) => {
      let leave = () => {};
      panel.onDidDispose(() => leave());
      return {
        async ready() {
          leave();
          page.tell(hello('recording', spot.file));
          leave = host.session.addPage(page.tell);
          return null;
        },
        envelope: (request) => worker.call.envelope({ session, ...request }),
        excerpt: (request) => worker.call.excerpt({ session, ...request }),
        async resume() {
          host.session.resume();
          return null;
        },
        stop: () => worker.call.stop({ session }),
        pairWith: () => runCommand('tapwright.pairRecordings', uri),
        openSampleBench: () => runCommand('tapwright.openSampleBench'),
        manageTrust: () => runCommand('workbench.trust.manage'),
        ...pairingsOnly,
      };
    });
  }
}

async function notHere(): Promise<never> {
  throw new Error('a recording has no document');
}

const pairingsOnly: Pick<PageCalls, 'edit' | 'write' | 'check' | 'openAsText' | 'openFile' | 'pickTrack'> = {
  edit: notHere,
  write: notHere,
  check: notHere,
  openAsText: notHere,
  openFile: notHere,
  pickTrack: notHere,
};

import type * as vscode from 'vscode';
import { openFromDocument } from '../commands/openFromDocument';
import { openAsText } from '../commands/openViews';
import { pickTrack } from '../commands/pickTrack';
import type { Services } from '../services';
import type { OpenPairings } from './openPairings';
import { openPage, runCommand } from './page';

export const pairingView = 'tapwright.pairing';

/** The page of a pairing document. */
export class PairingEditor implements vscode.CustomTextEditorProvider {
  constructor(
    private readonly services: Services,
    private readonly pairings: OpenPairings,
  ) {}

  resolveCustomTextEditor(document: vscode.TextDocument, panel: vscode.WebviewPanel): void {
    const pairing = this.pairings.hold(document);
    openPage(panel, this.services.extensionUri, (page) => {
      panel.onDidDispose(() => {
        pairing.leave(page);
        this.pairings.release(pairing);
      });
      return {
        async ready() {
          pairing.join(page);
          return null;
        },
        edit: (edit) => pairing.edit(page, edit),
        envelope: pairing.envelope,
        excerpt: pairing.excerpt,
        async resume() {
          pairing.resume();
          return null;
        },
        async stop() {
          await pairing.stop();
          return null;
        },
        write: () => pairing.write(),
        check: () => pairing.check(),
        openAsText: (position) => openAsText(document.uri, position),
        openFile: (file) => openFromDocument(pairing.spot, file, pairing.isRecording(file)),
        pickTrack: ({ file, role }) => pickTrack(this.services, pairing.spot, file, role),
        pairWith: () => runCommand('tapwright.pairRecordings'),
        openSampleBench: () => runCommand('tapwright.openSampleBench'),
        manageTrust: () => runCommand('workbench.trust.manage'),
      };
    });
  }
}

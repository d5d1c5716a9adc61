import * as vscode from 'vscode';
import type { PairingDocument } from '../../core/document/pairingDocument';
import { nameOf } from '../files/relativePath';
import type { Spot } from './spot';
import { watchedFiles } from './watchedFiles';

/** Milliseconds in which several changes count as one: a program writes a file piece by piece. */
const together = 300;

/** Watches the recordings that a document names and the files written from it. */
export class FileWatch {
  private watchers: vscode.Disposable[] = [];
  private key = '';
  private timer: ReturnType<typeof setTimeout> | undefined;

  constructor(
    private readonly spot: Spot,
    private readonly changed: () => void,
  ) {}

  /** Watches what this document names, no matter what was watched before. */
  follow(document: PairingDocument): void {
    const watched = watchedFiles(document, this.spot.folder, this.spot.file);
    const key = JSON.stringify(watched);
    if (key === this.key) return;
    this.stop();
    this.key = key;
    for (const { folder, files, starts } of watched) {
      const uri = vscode.Uri.joinPath(this.spot.rootUri, folder);
      const watcher = vscode.workspace.createFileSystemWatcher(new vscode.RelativePattern(uri, '*'));
      const heard = (changed: vscode.Uri) => {
        const name = nameOf(changed.path);
        const ours = files.includes(name) || starts.some((start) => name.startsWith(start));
        if (ours && !name.endsWith('.tmp')) this.soon();
      };
      this.watchers.push(
        watcher,
        watcher.onDidChange(heard),
        watcher.onDidCreate(heard),
        watcher.onDidDelete(heard),
      );
    }
  }

  dispose(): void {
    clearTimeout(this.timer);
    this.stop();
  }

  /** Tells the change a moment later, together with others that come until then. */
  soon(): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(this.changed, together);
  }

  private stop(): void {
    for (const watcher of this.watchers.splice(0)) watcher.dispose();
  }
}

import * as vscode from 'vscode';
import { pathIn } from '../../core/document/paths';
import type { FindingView } from '../../core/protocol/views';
import { spotOf } from '../editors/spot';
import { folderOf, nameOf, pathBelow } from '../files/relativePath';
import type { Services } from '../services';
import { Lookout, type Memory, memoryOf } from './lookout';
import { PairingIndex } from './pairingIndex';
import type { Entry } from './standing';

/** Folders of package managers and of version control hold no pairings of one's own. */
export const passedOver = '**/{node_modules,.git}/**';

/** Milliseconds in which several changes of files count as one. */
const together = 300;

/** Milliseconds of quiet before what is known is kept for the next start. */
const quiet = 2000;

/** Where a file is: the address of its workspace folder and its path from there. */
export interface Address {
  root: string;
  path: string;
}

/** The pairings of the workspace and how their written files stand, kept up to date as files change. */
export class Beside {
  readonly index = new PairingIndex();
  private readonly lookout: Lookout;
  private readonly changes = new vscode.EventEmitter<Entry | null>();
  private readonly disposables: vscode.Disposable[] = [];
  private readonly touched = new Set<string>();
  private timer: ReturnType<typeof setTimeout> | undefined;
  private keepTimer: ReturnType<typeof setTimeout> | undefined;
  private readonly memoryKey: string;
  private finding: Promise<void> = Promise.resolve();

  /** An entry that is new, changed or gone; null: taps files beside the pairings have changed. */
  readonly onDidChange = this.changes.event;

  constructor(
    private readonly services: Services,
    private readonly context: vscode.ExtensionContext,
  ) {
    // What another version has seen may mean something else.
    this.memoryKey = `written ${context.extension.packageJSON.version}`;
    this.lookout = new Lookout({
      index: this.index,
      look: (entry) =>
        services.worker.call.written({
          root: spotOf(vscode.Uri.parse(entry.document), services.platform).root,
          place: { file: entry.file, folder: entry.folder },
          seen: entry.view?.seen ?? null,
        }),
      looked: (entry, changed) => this.looked(entry, changed),
      failed: (entry, error) => services.log.error(`look at ${entry.file}: ${error}`),
    });
    const watcher = vscode.workspace.createFileSystemWatcher('**/*');
    this.disposables.push(
      this.changes,
      watcher,
      watcher.onDidChange((uri) => this.heard(uri, 'changed')),
      watcher.onDidCreate((uri) => this.heard(uri, 'created')),
      watcher.onDidDelete((uri) => this.heard(uri, 'deleted')),
      vscode.workspace.onDidChangeWorkspaceFolders(() => void this.find()),
    );
  }

  /** Finds the workspace's pairings and looks at each, what was known of them at hand. */
  find(): Promise<void> {
    this.finding = this.findAll();
    return this.finding;
  }

  /** Resolves once the workspace's pairings are known and looked at. */
  async found(): Promise<void> {
    await this.finding.catch(() => {});
  }

  private async findAll(): Promise<void> {
    const begun = performance.now();
    const found = await vscode.workspace.findFiles('**/*.pairing.json', passedOver);
    const known = this.context.workspaceState.get<Memory>(this.memoryKey, {});
    const documents = new Set(found.map((uri) => uri.toString()));
    for (const { document } of this.index.all) if (!documents.has(document)) this.forget(document);
    for (const uri of found) this.add(uri, known);
    this.changes.fire(null);
    this.lookout.ask(documents);
    await this.lookout.settled();
    this.services.log.info(`${found.length} pairings looked at: ${Math.round(performance.now() - begun)} ms`);
  }

  dispose(): void {
    clearTimeout(this.timer);
    clearTimeout(this.keepTimer);
    for (const disposable of this.disposables) disposable.dispose();
  }

  /** Looks at a pairing once more, where it is one of the workspace. */
  async lookAgain(document: vscode.Uri): Promise<void> {
    this.lookout.ask([document.toString()]);
    await this.lookout.settled();
  }

  /** A check has found these. */
  checked(document: vscode.Uri, findings: FindingView[]): void {
    const entry = this.index.get(document.toString());
    if (entry === undefined) return;
    const now = { ...entry, checked: findings };
    this.index.put(now);
    this.changes.fire(now);
    // Where no watcher tells, this is when the files are seen.
    this.lookout.ask([now.document]);
  }

  /** Null for a file outside the workspace. */
  addressOf(uri: vscode.Uri): Address | null {
    const folder = vscode.workspace.getWorkspaceFolder(uri);
    const path = folder && pathBelow(folder.uri.path, uri.path);
    return folder === undefined || path == null ? null : { root: folder.uri.toString(), path };
  }

  uriOf(root: string, path: string): vscode.Uri {
    return vscode.Uri.joinPath(vscode.Uri.parse(root), path);
  }

  private add(uri: vscode.Uri, known: Memory): void {
    const address = this.addressOf(uri);
    const document = uri.toString();
    if (address === null || this.index.get(document) !== undefined) return;
    const file = nameOf(address.path);
    const folder = folderOf(address.path);
    const view = Object.hasOwn(known, document) ? known[document] : null;
    const entry: Entry = { document, root: address.root, folder, file, view, checked: null };
    this.index.put(entry);
    if (view !== null) this.changes.fire(entry);
  }

  private forget(document: string): void {
    const entry = this.index.get(document);
    if (entry === undefined) return;
    this.index.remove(document);
    this.changes.fire({ ...entry, view: null, checked: null });
  }

  private looked(entry: Entry, changed: boolean): void {
    if (!changed) return;
    const path = pathIn(entry.folder, entry.file);
    if (entry.view?.seen.stamps[path] === 'missing') this.forget(entry.document);
    else this.changes.fire(entry);
    clearTimeout(this.keepTimer);
    this.keepTimer = setTimeout(() => {
      void this.context.workspaceState.update(this.memoryKey, memoryOf(this.index.all));
    }, quiet);
  }

  private heard(uri: vscode.Uri, how: 'changed' | 'created' | 'deleted'): void {
    const address = this.addressOf(uri);
    if (address === null) return;
    const { root, path } = address;
    if (how === 'created' && path.endsWith('.pairing.json') && !path.includes('node_modules/')) {
      this.add(uri, {});
      this.touched.add(uri.toString());
    }
    let hanging = this.index.hangingOn(root, path);
    // Of a folder that is gone nothing else is told, and neither is where one comes back.
    if (hanging.length === 0 && how !== 'changed') hanging = this.index.hangingBelow(root, path);
    for (const { document } of hanging) this.touched.add(document);
    if (path.endsWith('.taps.json')) this.changes.fire(null);
    if (this.touched.size === 0) return;
    clearTimeout(this.timer);
    this.timer = setTimeout(() => {
      this.lookout.ask(this.touched);
      this.touched.clear();
    }, together);
  }
}

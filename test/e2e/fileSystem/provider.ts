import * as vscode from 'vscode';
import { type Client, Refused } from './client';

const period = 250;

/** The server's folder as a file system. What changes behind its back is noticed by asking again and again. */
export class BenchFiles implements vscode.FileSystemProvider {
  private readonly changed = new vscode.EventEmitter<vscode.FileChangeEvent[]>();
  readonly onDidChangeFile = this.changed.event;
  private readonly watched = new Set<string>();
  private known: Record<string, string> | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;

  constructor(
    private readonly client: Client,
    private readonly scheme: string,
  ) {}

  dispose(): void {
    clearTimeout(this.timer);
    this.changed.dispose();
  }

  watch(uri: vscode.Uri): vscode.Disposable {
    const key = uri.toString();
    this.watched.add(key);
    if (this.timer === undefined) this.timer = setTimeout(() => this.look(uri), 0);
    return new vscode.Disposable(() => this.watched.delete(key));
  }

  stat = (uri: vscode.Uri) => told(this.client.stat(uri.path), uri);
  readDirectory = (uri: vscode.Uri) => told(this.client.list(uri.path), uri);
  readFile = (uri: vscode.Uri) => told(this.client.read(uri.path), uri);
  writeFile = (uri: vscode.Uri, content: Uint8Array, options: { create: boolean; overwrite: boolean }) =>
    told(this.client.write(uri.path, content, options), uri);
  rename = (from: vscode.Uri, to: vscode.Uri, options: { overwrite: boolean }) =>
    told(this.client.rename(from.path, to.path, options.overwrite), from);
  delete = (uri: vscode.Uri, options: { recursive: boolean }) =>
    told(this.client.remove(uri.path, options.recursive), uri);
  createDirectory = (uri: vscode.Uri) => told(this.client.makeFolder(uri.path), uri);

  private async look(uri: vscode.Uri): Promise<void> {
    try {
      if (this.watched.size > 0) {
        const now = await this.client.tree('/');
        const events = this.known === null ? [] : differences(this.known, now);
        this.known = now;
        if (events.length > 0) {
          this.changed.fire(
            events.map(({ type, path }) => ({ type, uri: uri.with({ scheme: this.scheme, path }) })),
          );
        }
      }
    } finally {
      this.timer = setTimeout(() => this.look(uri), period);
    }
  }
}

function differences(before: Record<string, string>, now: Record<string, string>) {
  const events: { type: vscode.FileChangeType; path: string }[] = [];
  for (const [path, stamp] of Object.entries(now)) {
    if (before[path] === undefined) events.push({ type: vscode.FileChangeType.Created, path });
    else if (before[path] !== stamp) events.push({ type: vscode.FileChangeType.Changed, path });
  }
  for (const path of Object.keys(before)) {
    if (now[path] === undefined) events.push({ type: vscode.FileChangeType.Deleted, path });
  }
  return events;
}

/** The workbench understands its own errors only. */
async function told<T>(work: Promise<T>, uri: vscode.Uri): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (!(error instanceof Refused)) throw error;
    if (error.code === 'FileNotFound') throw vscode.FileSystemError.FileNotFound(uri);
    if (error.code === 'FileExists') throw vscode.FileSystemError.FileExists(uri);
    if (error.code === 'FileIsADirectory') throw vscode.FileSystemError.FileIsADirectory(uri);
    if (error.code === 'FileNotADirectory') throw vscode.FileSystemError.FileNotADirectory(uri);
    if (error.code === 'NoPermissions') throw vscode.FileSystemError.NoPermissions(uri);
    throw error;
  }
}

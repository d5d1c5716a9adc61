import * as vscode from 'vscode';
import type { Root } from '../../core/protocol/messages';
import { nameOf, pathBelow } from '../files/relativePath';
import type { Platform } from '../platform';

/** Where a file is, for the worker and for the host. */
export interface Spot {
  /** The workspace folder that holds the file, else the file's own folder: nothing named in it may leave it. */
  rootUri: vscode.Uri;
  folderUri: vscode.Uri;
  root: Root;
  /** Folder from the root, with forward slashes; '' for the root itself. */
  folder: string;
  /** File name without folder. */
  file: string;
}

export function spotOf(uri: vscode.Uri, platform: Platform): Spot {
  const folderUri = vscode.Uri.joinPath(uri, '..');
  const rootUri = vscode.workspace.getWorkspaceFolder(uri)?.uri ?? folderUri;
  const local = platform.localFolder(rootUri);
  return {
    rootUri,
    folderUri,
    root: local === null ? { kind: 'host', uri: rootUri.toString() } : { kind: 'local', folder: local },
    folder: pathBelow(rootUri.path, folderUri.path) ?? '',
    file: nameOf(uri.path),
  };
}

/** Path from the root of a file; null where it lies outside. */
export function fromRoot({ rootUri }: Spot, uri: vscode.Uri): string | null {
  const sameDisk = uri.scheme === rootUri.scheme && uri.authority === rootUri.authority;
  return sameDisk ? pathBelow(rootUri.path, uri.path) : null;
}

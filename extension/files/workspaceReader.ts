import * as vscode from 'vscode';
import type { FolderReader } from './hostCalls';

/** Reading through the workbench's file systems. */
export const workspaceReader: FolderReader = {
  stat: (address) => vscode.workspace.fs.stat(vscode.Uri.parse(address)),
  list: (address) => vscode.workspace.fs.readDirectory(vscode.Uri.parse(address)),
  read: (address) => vscode.workspace.fs.readFile(vscode.Uri.parse(address)),
  join: (address, path) => vscode.Uri.joinPath(vscode.Uri.parse(address), path).toString(),
  missing: (error) => error instanceof vscode.FileSystemError && error.code === 'FileNotFound',
};

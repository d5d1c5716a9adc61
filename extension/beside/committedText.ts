import * as vscode from 'vscode';

/** The part of the Git extension's public interface that is used; the extension is not there in every host. */
interface GitExports {
  getAPI(version: 1): {
    getRepository(uri: vscode.Uri): { show(ref: string, path: string): Promise<string> } | null;
  };
}

/** Text of a file as the last commit has it; null without Git, outside a repository, and where it has no such file. */
export async function committedText(uri: vscode.Uri): Promise<string | null> {
  const extension = vscode.extensions.getExtension<GitExports>('vscode.git');
  if (extension === undefined) return null;
  try {
    const git = extension.isActive ? extension.exports : await extension.activate();
    return (await git.getAPI(1).getRepository(uri)?.show('HEAD', uri.fsPath)) ?? null;
  } catch {
    // Git is switched off, or the file was never committed.
    return null;
  }
}

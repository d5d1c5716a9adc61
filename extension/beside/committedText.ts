import * as vscode from 'vscode';

/** The part of the Git extension's public interface that is used; the extension is not there in every host. */
interface GitExports {
  getAPI(version: 1): GitApi;
}

interface GitApi {
  readonly state: 'uninitialized' | 'initialized';
  readonly onDidChangeState: vscode.Event<GitApi['state']>;
  getRepository(uri: vscode.Uri): { show(ref: string, path: string): Promise<string> } | null;
}

/** Milliseconds that Git may look for repositories until it counts as having none. */
const longestSearch = 10_000;

/** Text of a file as the last commit has it; null without Git, outside a repository, and where it has no such file. */
export async function committedText(uri: vscode.Uri): Promise<string | null> {
  const extension = vscode.extensions.getExtension<GitExports>('vscode.git');
  if (extension === undefined) return null;
  try {
    const git = (extension.isActive ? extension.exports : await extension.activate()).getAPI(1);
    await searched(git);
    return (await git.getRepository(uri)?.show('HEAD', uri.fsPath)) ?? null;
  } catch {
    // Git is switched off, or the file was never committed.
    return null;
  }
}

/** Resolves once the workspace's repositories are known: soon after the start they are not yet. */
function searched(git: GitApi): Promise<void> {
  if (git.state === 'initialized') return Promise.resolve();
  return new Promise((resolve) => {
    const end = () => {
      clearTimeout(timer);
      heard.dispose();
      resolve();
    };
    const timer = setTimeout(end, longestSearch);
    const heard = git.onDidChangeState(end);
  });
}

import * as vscode from 'vscode';
import { newClient } from './client';
import { BenchFiles } from './provider';

/** The proposed call that quick open needs; the type package does not have it. */
interface FileSearch {
  registerFileSearchProvider(
    scheme: string,
    provider: {
      provideFileSearchResults(query: unknown, options: { folder: vscode.Uri }): Promise<vscode.Uri[]>;
    },
  ): vscode.Disposable;
}

/** `bench` is always trusted, `vscode-vfs` only once the user says so; both show the same folder. */
const schemes = ['bench', 'vscode-vfs'];

export function activate(context: vscode.ExtensionContext): void {
  const client = newClient(context.extensionUri);
  for (const scheme of schemes) {
    const files = new BenchFiles(client, scheme);
    context.subscriptions.push(
      files,
      vscode.workspace.registerFileSystemProvider(scheme, files, { isCaseSensitive: true }),
      (vscode.workspace as unknown as FileSearch).registerFileSearchProvider(scheme, {
        // The workbench matches what was typed itself.
        provideFileSearchResults: async (_query, { folder }) => {
          const tree = await client.tree(folder.path);
          const paths = Object.keys(tree).filter((path) => tree[path] !== '');
          return paths.map((path) => folder.with({ path }));
        },
      }),
    );
  }
}

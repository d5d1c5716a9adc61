import * as vscode from 'vscode';
import type { PageCalls, ToPage } from '../../core/protocol/messages';
import { type Frame, link } from '../../core/protocol/rpc';
import { dictionary } from '../translated';
import { newNonce, pageHtml } from './pageHtml';

/** One webview with the page in it. */
export interface Page {
  tell(notice: ToPage): void;
}

/**
 * Fills a webview with the page and joins it.
 * @param answers gets the page's calls; `ready` comes again each time the page is made anew
 */
export function openPage(
  panel: vscode.WebviewPanel,
  extensionUri: vscode.Uri,
  answers: (page: Page) => PageCalls,
): void {
  const { webview } = panel;
  const dist = vscode.Uri.joinPath(extensionUri, 'dist');
  const address = (file: string) => webview.asWebviewUri(vscode.Uri.joinPath(dist, file)).toString();
  let open = true;
  panel.onDidDispose(() => {
    open = false;
  });
  const page: Page = { tell: (notice) => end.tell(notice) };
  const end = link<Record<never, never>, PageCalls>(
    {
      // A page that is hidden or gone hears nothing; it says "ready" when it comes back.
      post: (message) => {
        if (open) void webview.postMessage(message);
      },
      listen: (receive) => {
        const heard = webview.onDidReceiveMessage((message: Frame) => receive(message));
        panel.onDidDispose(() => heard.dispose());
      },
    },
    answers(page),
  );
  webview.options = { enableScripts: true, localResourceRoots: [dist] };
  webview.html = pageHtml({
    nonce: newNonce(),
    source: webview.cspSource,
    script: address('page.js'),
    style: address('page.css'),
    language: vscode.env.language,
  });
}

/** Runs a command of the workbench for a page. */
export async function runCommand(name: string, ...parameters: unknown[]): Promise<null> {
  await vscode.commands.executeCommand(name, ...parameters);
  return null;
}

/** The first that a page hears. */
export function hello(kind: 'pairing' | 'recording', file: string): ToPage {
  return {
    type: 'hello',
    kind,
    file,
    words: dictionary(),
    locale: vscode.env.language,
    trusted: vscode.workspace.isTrusted,
  };
}

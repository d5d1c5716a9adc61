import * as vscode from 'vscode';
import { type Fix, fixesOf } from './fixesOf';
import type { Problems } from './problems';
import type { Problem } from './problemsOf';

/** What can be done about each problem, where it is shown. */
export class QuickFixes implements vscode.CodeActionProvider {
  static readonly metadata: vscode.CodeActionProviderMetadata = {
    providedCodeActionKinds: [vscode.CodeActionKind.QuickFix],
  };

  constructor(private readonly problems: Problems) {}

  provideCodeActions(document: vscode.TextDocument, range: vscode.Range): vscode.CodeAction[] {
    return this.problems.at(document.uri, range).flatMap(({ problem, diagnostic }) =>
      fixesOf(problem).map((fix, i) => {
        const { title, command, more } = actionOf(fix, problem);
        const action = new vscode.CodeAction(title, vscode.CodeActionKind.QuickFix);
        action.command = { title, command, arguments: [vscode.Uri.parse(problem.document), ...more] };
        action.diagnostics = [diagnostic];
        action.isPreferred = i === 0;
        return action;
      }),
    );
  }
}

function actionOf(fix: Fix, { at, missing }: Problem): { title: string; command: string; more: unknown[] } {
  switch (fix) {
    case 'write':
      return { title: vscode.l10n.t('Write Again'), command: 'tapwright.solveAndWrite', more: [] };
    case 'relink':
      return {
        title: vscode.l10n.t('Find the Moved Recording by its Digest'),
        command: 'tapwright.relinkRecording',
        more: [missing],
      };
    case 'open':
      return { title: vscode.l10n.t('Open Pairing'), command: 'tapwright.openPage', more: [] };
    case 'show':
      return { title: vscode.l10n.t('Show in Text'), command: 'tapwright.showInText', more: [at] };
  }
}

import * as vscode from 'vscode';
import type { Beside } from './beside';
import { arrayLine, holdsArray } from './generatedNames';
import { type Standing, standingInWords, standingOf } from './standing';

/** The line above a generated array: how it stands, and what can be done. */
export class ArrayLens implements vscode.CodeLensProvider {
  private readonly changes = new vscode.EventEmitter<void>();
  readonly onDidChangeCodeLenses = this.changes.event;
  private readonly disposables: vscode.Disposable[];

  constructor(private readonly beside: Beside) {
    this.disposables = [
      this.changes,
      beside.onDidChange(() => this.changes.fire()),
      vscode.workspace.onDidChangeConfiguration((event) => {
        if (event.affectsConfiguration('tapwright.lens')) this.changes.fire();
      }),
    ];
  }

  dispose(): void {
    for (const disposable of this.disposables) disposable.dispose();
  }

  provideCodeLenses(document: vscode.TextDocument): vscode.CodeLens[] {
    if (!holdsArray(document.uri.path)) return [];
    if (!vscode.workspace.getConfiguration('tapwright', document.uri).get('lens', true)) return [];
    const address = this.beside.addressOf(document.uri);
    const entry = address && this.beside.index.byOutput(address.root, address.path);
    const line = arrayLine(document.getText());
    if (entry == null || line === null) return [];
    const range = new vscode.Range(line, 0, line, 0);
    const uri = vscode.Uri.parse(entry.document);
    const standing = standingOf(entry);
    const lens = (title: string, command = '') =>
      new vscode.CodeLens(range, { title, command, arguments: command === '' ? [] : [uri] });
    return [
      lens(`$(${icon(standing)}) ${standingInWords(standing, vscode.l10n.t)}`),
      lens(vscode.l10n.t('Open Pairing'), 'tapwright.openPage'),
      lens(vscode.l10n.t('Check Now'), 'tapwright.check'),
      lens(vscode.l10n.t('Write Again'), 'tapwright.solveAndWrite'),
    ];
  }
}

function icon(standing: Standing): string {
  if (standing === 'current') return 'check';
  if (standing === 'unknown') return 'question';
  return standing === 'over-limit' || standing === 'bad-input' ? 'error' : 'warning';
}

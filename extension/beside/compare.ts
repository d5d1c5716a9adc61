import * as vscode from 'vscode';
import { Refusal } from '../../core/findings/finding';
import { sayWithPlace } from '../../core/findings/say';
import type { OpenPairings } from '../editors/openPairings';
import { nameOf } from '../files/relativePath';
import { plainNotice } from '../plainNotice';
import { dictionary } from '../translated';
import type { Beside } from './beside';
import { committedText } from './committedText';
import { comparisonText, type Side } from './comparisonText';
import { presentPalette } from './theme';

const scheme = 'tapwright-comparison';

/** "Compare with Last Commit": both filters on a read-only page. */
export class Comparison implements vscode.TextDocumentContentProvider {
  private readonly texts = new Map<string, string>();
  private readonly changes = new vscode.EventEmitter<vscode.Uri>();
  readonly onDidChange = this.changes.event;
  private readonly registered = vscode.workspace.registerTextDocumentContentProvider(scheme, this);

  constructor(
    private readonly beside: Beside,
    private readonly pairings: OpenPairings,
  ) {}

  dispose(): void {
    this.registered.dispose();
    this.changes.dispose();
  }

  provideTextDocumentContent(uri: vscode.Uri): string {
    return this.texts.get(uri.toString()) ?? '';
  }

  async show(document: vscode.Uri): Promise<void> {
    await this.beside.lookAgain(document);
    const entry = this.beside.index.get(document.toString());
    const taps = entry?.view?.tapsFile == null ? null : this.beside.uriOf(entry.root, entry.view.tapsFile);
    const written = taps === null ? null : await textOf(taps);
    if (taps === null || written === null) {
      const text = vscode.l10n.t('{0}: nothing was written yet to compare with.', nameOf(document.path));
      void vscode.window.showInformationMessage(plainNotice(text));
      return;
    }
    const sides = await this.sides(document, taps, written);
    if (sides === null) {
      const text = vscode.l10n.t('{0}: there is no design now to compare with.', nameOf(document.path));
      void vscode.window.showInformationMessage(plainNotice(text));
      return;
    }
    try {
      const text = comparisonText(nameOf(taps.path), ...sides, presentPalette(), vscode.l10n.t, dictionary());
      await this.open(nameOf(taps.path), document, text);
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      void vscode.window.showWarningMessage(plainNotice(error.findings.map(sayWithPlace).join(' ')));
    }
  }

  /** What is written against the last commit, or where that has none what the document gives now against what is written. */
  private async sides(document: vscode.Uri, taps: vscode.Uri, written: string): Promise<[Side, Side] | null> {
    const committed = await committedText(taps);
    const working = vscode.l10n.t('written');
    if (committed !== null) {
      return [
        { label: vscode.l10n.t('last commit'), text: committed },
        { label: working, text: written },
      ];
    }
    const pairing = this.pairings.hold(await vscode.workspace.openTextDocument(document));
    try {
      const file = (await pairing.files())?.at(-1);
      if (file === undefined) return null;
      const now = new TextDecoder().decode(file.bytes);
      return [
        { label: working, text: written },
        { label: vscode.l10n.t('now'), text: now },
      ];
    } finally {
      this.pairings.release(pairing);
    }
  }

  private async open(file: string, document: vscode.Uri, text: string): Promise<void> {
    // The query tells pairings of the same name apart.
    const query = document.toString();
    const title = vscode.l10n.t('Comparison of {0}', file.replace(/\.taps\.json$/, ''));
    const uri = vscode.Uri.from({ scheme, path: `/${title}.md`, query });
    this.texts.set(uri.toString(), text);
    this.changes.fire(uri);
    try {
      await vscode.commands.executeCommand('markdown.showPreview', uri);
    } catch {
      // The workbench's own preview was switched off.
      await vscode.window.showTextDocument(uri, { preview: true });
    }
  }
}

async function textOf(uri: vscode.Uri): Promise<string | null> {
  try {
    return new TextDecoder().decode(await vscode.workspace.fs.readFile(uri));
  } catch {
    return null;
  }
}

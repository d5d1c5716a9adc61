import * as vscode from 'vscode';
import { Refusal } from '../../core/findings/finding';
import { nameOf } from '../files/relativePath';
import type { Beside } from './beside';
import { symbolsOf } from './generatedNames';
import { hoverText } from './hoverText';
import { standingInWords, standingOf } from './standing';
import type { StrayTaps } from './strayTaps';
import { presentPalette } from './theme';

/** Bytes of a taps file that a hover reads at most. */
const largest = 16 * 1024 * 1024;

/** What a generated name stands for, in any file that has it. */
export class ArrayHover implements vscode.HoverProvider {
  constructor(
    private readonly beside: Beside,
    private readonly stray: StrayTaps,
  ) {}

  async provideHover(
    document: vscode.TextDocument,
    position: vscode.Position,
  ): Promise<vscode.Hover | undefined> {
    const range = document.getWordRangeAtPosition(position, /[A-Za-z_]\w*/);
    if (range === undefined) return undefined;
    const word = document.getText(range);
    const before = document.getText(new vscode.Range(range.start.with(undefined, 0), range.start));
    // A generated file names its symbol nowhere but in its own name, in Rust.
    const text = () => `${nameOf(document.uri.path)}\n${document.getText()}`;
    const symbols = (known: Iterable<string>) => symbolsOf(word, before, known, text, document.languageId);
    const own = this.fromPairing(document, symbols);
    if (own !== null) return this.hover(own, range);
    // Most words are none of ours: no file is looked for on their account.
    if (!/_(taps|input|expected)$/.test(word) && !/^[A-Z][A-Z0-9_]*$/.test(word)) return undefined;
    const stray = await this.stray.bySymbol();
    const found = symbols(stray.keys()).flatMap((symbol) => stray.get(symbol) ?? []);
    const standing = vscode.l10n.t('its pairing document is not in this workspace, or cannot be read');
    return found.length === 0 ? undefined : this.hover({ taps: found[0], standing, pairing: null }, range);
  }

  /** Of a pairing of the workspace: the file's own where it is a written one, otherwise the nearest of that name. */
  private fromPairing(document: vscode.TextDocument, symbols: (known: Iterable<string>) => string[]) {
    const { index } = this.beside;
    const address = this.beside.addressOf(document.uri) ?? { root: '', path: '' };
    const written = index.byOutput(address.root, address.path);
    const near = symbols(index.symbols()).flatMap((symbol) =>
      index.bySymbol(symbol, address.root, address.path),
    );
    const entry = near.find((one) => one === written) ?? near[0];
    if (entry === undefined || entry.view?.tapsFile == null) return null;
    return {
      taps: this.beside.uriOf(entry.root, entry.view.tapsFile),
      standing: standingInWords(standingOf(entry), vscode.l10n.t),
      pairing: entry.document,
    };
  }

  private async hover(
    { taps, standing, pairing }: { taps: vscode.Uri; standing: string; pairing: string | null },
    range: vscode.Range,
  ): Promise<vscode.Hover | undefined> {
    const picture = vscode.workspace.getConfiguration('tapwright', taps).get('hover.picture', true);
    const link =
      pairing === null ? null : `command:tapwright.openPage?${encodeURIComponent(JSON.stringify([pairing]))}`;
    try {
      if ((await vscode.workspace.fs.stat(taps)).size > largest) return undefined;
      const text = new TextDecoder().decode(await vscode.workspace.fs.readFile(taps));
      const palette = picture ? presentPalette() : null;
      const says = hoverText(text, nameOf(taps.path), { palette, standing, link, t: vscode.l10n.t });
      const markdown = new vscode.MarkdownString(says);
      markdown.isTrusted = { enabledCommands: ['tapwright.openPage'] };
      return new vscode.Hover(markdown, range);
    } catch (error) {
      // Not written yet, or no file that this version can read: nothing to say.
      if (error instanceof Refusal || error instanceof vscode.FileSystemError) return undefined;
      throw error;
    }
  }
}

import * as vscode from 'vscode';
import { tapsFigures } from '../../core/files/tapsFigures';
import { type Beside, passedOver } from './beside';

/** Taps files read at most to find a name. */
const mostFiles = 100;

/** Taps files whose pairing is not in the workspace, by their symbol; looked for when a name is asked for that no pairing has. */
export class StrayTaps {
  private found: Promise<Map<string, vscode.Uri>> | null = null;
  private readonly heard: vscode.Disposable;

  constructor(private readonly beside: Beside) {
    this.heard = beside.onDidChange((entry) => {
      // Of a pairing that is gone, or cannot be read, the taps files may have stayed.
      if (entry === null || entry.view?.symbol == null) this.found = null;
    });
  }

  dispose(): void {
    this.heard.dispose();
  }

  bySymbol(): Promise<Map<string, vscode.Uri>> {
    this.found ??= this.find();
    return this.found;
  }

  private async find(): Promise<Map<string, vscode.Uri>> {
    await this.beside.found();
    const bySymbol = new Map<string, vscode.Uri>();
    for (const uri of await vscode.workspace.findFiles('**/*.taps.json', passedOver, mostFiles)) {
      const address = this.beside.addressOf(uri);
      if (address !== null && this.beside.index.byOutput(address.root, address.path) !== undefined) continue;
      try {
        const text = new TextDecoder().decode(await vscode.workspace.fs.readFile(uri));
        const { symbol } = tapsFigures(text);
        if (symbol !== null) bySymbol.set(symbol, uri);
      } catch {
        // A file that cannot be read has no names to explain.
      }
    }
    return bySymbol;
  }
}

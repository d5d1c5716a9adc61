import * as vscode from 'vscode';
import { dictionary } from '../translated';
import type { Beside } from './beside';
import { arrayLine } from './generatedNames';
import { type Problem, problemsOf } from './problemsOf';
import type { Entry } from './standing';

interface Shown {
  uri: vscode.Uri;
  problem: Problem;
  diagnostic: vscode.Diagnostic;
}

/** The entries of the Problems view, kept up to date. */
export class Problems {
  private readonly collection = vscode.languages.createDiagnosticCollection('tapwright');
  private readonly byDocument = new Map<string, Shown[]>();
  private readonly disposables: vscode.Disposable[];
  private updating: Promise<void> = Promise.resolve();

  constructor(private readonly beside: Beside) {
    this.disposables = [
      this.collection,
      beside.onDidChange((entry) => {
        if (entry !== null) this.update([entry]);
      }),
      vscode.workspace.onDidChangeConfiguration((event) => {
        if (event.affectsConfiguration('tapwright.problems')) this.update(beside.index.all);
      }),
    ];
  }

  dispose(): void {
    for (const disposable of this.disposables) disposable.dispose();
  }

  /** Problems of ours that a range of a file touches. */
  at(uri: vscode.Uri, range: vscode.Range): { problem: Problem; diagnostic: vscode.Diagnostic }[] {
    const key = uri.toString();
    return [...this.byDocument.values()]
      .flat()
      .filter(
        (shown) => shown.uri.toString() === key && shown.diagnostic.range.intersection(range) !== undefined,
      );
  }

  /** One after the other: places are looked up in files. */
  private update(entries: readonly Entry[]): void {
    this.updating = this.updating.then(async () => {
      for (const entry of entries) await this.show(entry);
    });
  }

  private async show(entry: Entry): Promise<void> {
    const before = this.byDocument.get(entry.document) ?? [];
    const wanted = vscode.workspace
      .getConfiguration('tapwright', vscode.Uri.parse(entry.document))
      .get('problems', true);
    const problems = wanted ? problemsOf(entry, vscode.l10n.t, dictionary()) : [];
    const now = await Promise.all(problems.map((problem) => this.placed(entry, problem)));
    this.byDocument.set(entry.document, now);
    const all = [...this.byDocument.values()].flat();
    for (const key of new Set([...before, ...now].map(({ uri }) => uri.toString()))) {
      const here = all.filter(({ uri }) => uri.toString() === key);
      this.collection.set(
        vscode.Uri.parse(key),
        here.map(({ diagnostic }) => diagnostic),
      );
    }
  }

  private async placed(entry: Entry, problem: Problem): Promise<Shown> {
    const uri = this.beside.uriOf(entry.root, problem.path);
    const { line, column } = problem.at === 'array' ? await arrayPlace(uri) : problem.at;
    const start = new vscode.Position(line - 1, column - 1);
    // Of an array the whole line; in a document the word that stands there.
    const end = problem.at === 'array' ? new vscode.Position(line - 1, 1000) : start;
    const severity =
      problem.severity === 'error' ? vscode.DiagnosticSeverity.Error : vscode.DiagnosticSeverity.Warning;
    const diagnostic = new vscode.Diagnostic(new vscode.Range(start, end), problem.text, severity);
    diagnostic.source = 'Tapwright';
    diagnostic.code = problem.code;
    return { uri, problem, diagnostic };
  }
}

/** The first line where there is no array, or no file. */
async function arrayPlace(uri: vscode.Uri): Promise<{ line: number; column: number }> {
  try {
    const text = new TextDecoder().decode(await vscode.workspace.fs.readFile(uri));
    return { line: 1 + (arrayLine(text) ?? 0), column: 1 };
  } catch {
    return { line: 1, column: 1 };
  }
}

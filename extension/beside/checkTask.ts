import * as vscode from 'vscode';
import { pathIn } from '../../core/document/paths';
import { visible } from '../../core/figures/visible';
import type { Services } from '../services';
import type { Beside } from './beside';
import { checkPairing } from './checkPairing';
import { problemText } from './problemText';

export const taskType = 'tapwright';

interface Definition extends vscode.TaskDefinition {
  task: 'check';
  /** Path from the workspace folder; left out: every pairing. */
  pairing?: string;
}

/** The task "check", which runs in the extension itself and thus everywhere. */
export class CheckTasks implements vscode.TaskProvider {
  constructor(
    private readonly services: Services,
    private readonly beside: Beside,
  ) {}

  provideTasks(): vscode.Task[] {
    return [this.task({ type: taskType, task: 'check' }, vscode.TaskScope.Workspace)];
  }

  resolveTask({ definition, scope }: vscode.Task): vscode.Task | undefined {
    if (definition.task !== 'check') return undefined;
    return this.task(definition as Definition, scope ?? vscode.TaskScope.Workspace);
  }

  private task(definition: Definition, scope: NonNullable<vscode.Task['scope']>): vscode.Task {
    const wanted = definition.pairing === undefined ? null : definition.pairing.replace(/^\.\//, '');
    const run = async () => new CheckTerminal(this.services, this.beside, wanted, scope);
    const task = new vscode.Task(definition, scope, 'check', 'Tapwright', new vscode.CustomExecution(run));
    task.group = vscode.TaskGroup.Test;
    return task;
  }
}

/** 0: current; 1: stale, edited, different or over a limit; 2: bad input: as the command line ends. */
const exits = { current: 0, failed: 1, 'bad-input': 2 } as const;

/** Prints what the command line would. */
class CheckTerminal implements vscode.Pseudoterminal {
  private readonly text = new vscode.EventEmitter<string>();
  private readonly end = new vscode.EventEmitter<number>();
  readonly onDidWrite = this.text.event;
  readonly onDidClose = this.end.event;
  private closed = false;

  constructor(
    private readonly services: Services,
    private readonly beside: Beside,
    private readonly wanted: string | null,
    private readonly scope: vscode.Task['scope'],
  ) {}

  open(): void {
    void this.run();
  }

  close(): void {
    this.closed = true;
  }

  private async run(): Promise<void> {
    let worst = 0;
    try {
      // A task can be run before the workspace has been looked through.
      await this.beside.found();
      const checked = this.pairings();
      if (checked.length === 0) {
        this.print(this.nothingFound());
        worst = exits['bad-input'];
      }
      for (const { document, path } of checked) {
        if (this.closed) return;
        const { state, findings } = await checkPairing(this.services, this.beside, document);
        for (const found of findings) this.print(problemText(found, path));
        if (state === 'current') this.print(`${path}: current`);
        worst = Math.max(worst, exits[state]);
      }
    } catch (error) {
      this.print(String(error));
      worst = exits['bad-input'];
    }
    this.end.fire(worst);
  }

  private nothingFound(): string {
    if (this.wanted === null) return 'no pairing document was found in the workspace';
    return `${visible(this.wanted)}:1:1: error: there is no such pairing document in the workspace. "pairing" of the task is a path from the workspace folder, or left out for all. [missing-file]`;
  }

  private pairings(): { document: vscode.Uri; path: string }[] {
    const folder = typeof this.scope === 'object' ? this.scope.uri.toString() : null;
    return this.beside.index.all
      .map(({ document, root, folder: inside, file }) => ({
        document: vscode.Uri.parse(document),
        root,
        path: pathIn(inside, file),
      }))
      .filter(({ root, path }) => (folder === null || root === folder) && (this.wanted ?? path) === path)
      .sort((a, b) => (a.path < b.path ? -1 : 1));
  }

  private print(line: string): void {
    this.text.fire(`${line}\r\n`);
  }
}

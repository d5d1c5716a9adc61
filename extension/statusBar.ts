import * as vscode from 'vscode';

/** Milliseconds after which work shows. */
const patience = 1000;

interface Running {
  what: string;
  share: number;
  since: number;
}

/** Shows work that takes more than a second, of whichever document began first. */
export class StatusBar {
  private readonly item = vscode.window.createStatusBarItem('tapwright.busy', vscode.StatusBarAlignment.Left);
  private readonly running = new Map<string, Running>();
  private timer: ReturnType<typeof setTimeout> | undefined;

  constructor() {
    this.item.name = vscode.l10n.t('Tapwright: work in progress');
    this.item.command = 'tapwright.showLog';
  }

  /** @param busy null: over */
  show(session: string, busy: { what: string; share: number } | null): void {
    const before = this.running.get(session);
    if (busy === null) this.running.delete(session);
    else this.running.set(session, { ...busy, since: before?.since ?? Date.now() });
    this.update();
  }

  dispose(): void {
    clearTimeout(this.timer);
    this.item.dispose();
  }

  private update(): void {
    clearTimeout(this.timer);
    const [first] = this.running.values();
    if (first === undefined) {
      this.item.hide();
      return;
    }
    const left = first.since + patience - Date.now();
    if (left > 0) {
      this.timer = setTimeout(() => this.update(), left);
      return;
    }
    const percent = Math.round(100 * first.share);
    this.item.text = `$(sync~spin) ${vscode.l10n.t('{0}, {1} %', first.what, percent)}`;
    this.item.tooltip = vscode.l10n.t('Tapwright is computing. Click for the log.');
    this.item.show();
  }
}

import * as vscode from 'vscode';
import type { TakeEntry } from '../../core/document/pairingDocument';
import { parseJson } from '../../core/document/parseJson';
import type { PageCalls, ToPage, UpdateRequest } from '../../core/protocol/messages';
import { untrusted, type WriteOutcome, writeDesign } from '../files/writeDesign';
import { hostFinding } from '../findingsOfHost';
import { timed } from '../log';
import type { Services } from '../services';
import { applyChanges } from './applyEdit';
import { type DocumentView, documentView } from './documentView';
import { type HostSession, newHostSession } from './hostSession';
import { hello, type Page } from './page';
import { type Spot, spotOf } from './spot';
import { FileWatch } from './watchFiles';

/** Milliseconds of quiet before a changed text is computed. */
const quiet = 30;

/** Times that files are asked for while the document changes under them. */
const mostTries = 5;

/** One pairing document that is open, with all its pages: its text is the only truth. */
export class Pairing {
  readonly spot: Spot;
  private readonly host: HostSession;
  private readonly watch: FileWatch;
  private readonly disposables: vscode.Disposable[] = [];
  private readonly pages = new Map<Page, { answers: number; leave: () => void }>();
  private text: string | null = null;
  private view: DocumentView = { form: null, findings: [] };
  private lastTakes: readonly TakeEntry[] = [];
  private editing: Promise<unknown> = Promise.resolve();
  private editsUnderWay = 0;
  private timer: ReturnType<typeof setTimeout> | undefined;

  constructor(
    readonly document: vscode.TextDocument,
    private readonly services: Services,
  ) {
    this.spot = spotOf(document.uri, services.platform);
    this.host = newHostSession(services, this.spot.file, (id, generation) =>
      services.worker.call.update({ session: id, generation, ...this.request() }),
    );
    this.watch = new FileWatch(this.spot, () => this.refresh());
    this.disposables.push(
      this.host,
      this.watch,
      vscode.workspace.onDidChangeTextDocument((event) => {
        // An edit of ours is told when it is done, with its number.
        if (event.document === document && this.editsUnderWay === 0) this.readText();
      }),
      vscode.workspace.onDidGrantWorkspaceTrust(() =>
        this.host.session.tell({ type: 'trusted', trusted: true }),
      ),
    );
    this.readText();
  }

  dispose(): void {
    clearTimeout(this.timer);
    for (const disposable of this.disposables) disposable.dispose();
  }

  /** A page that is there, or there again, hears everything. */
  join(page: Page): void {
    this.leave(page);
    page.tell(hello('pairing', this.spot.file));
    page.tell(this.documentNotice(0));
    this.pages.set(page, { answers: 0, leave: this.host.session.addPage(page.tell) });
  }

  leave(page: Page): void {
    this.pages.get(page)?.leave();
    this.pages.delete(page);
  }

  /** Whether the document, in the last form that could be read, names this file as a recording. */
  isRecording(file: string): boolean {
    return this.lastTakes.some(({ inputs, desired }) =>
      [...inputs, desired].some((track) => track.file === file),
    );
  }

  /** Leads every page to a section. */
  show(section: string): void {
    this.host.session.tell({ type: 'show', section });
  }

  /** Makes a page's changes, one edit after the other in the order in which they came. */
  edit(page: Page, { number, changes }: Parameters<PageCalls['edit']>[0]): Promise<null> {
    const edit = this.editing.then(async () => {
      this.editsUnderWay++;
      try {
        // Edits of a text that is no JSON would garble it; of one with other faults they may mend it.
        if (parseJson(this.document.getText()).root === undefined) {
          throw new Error(vscode.l10n.t('The text is no JSON. Mend it as text first.'));
        }
        await applyChanges(this.document, changes);
      } finally {
        this.editsUnderWay--;
        const known = this.pages.get(page);
        // Also where it failed: the field is to show what the text says.
        if (known !== undefined) known.answers = number;
        this.readText();
        if (known !== undefined) page.tell(this.documentNotice(number));
      }
      return null;
    });
    this.editing = edit.catch(() => {});
    return edit;
  }

  envelope: PageCalls['envelope'] = (request) =>
    this.services.worker.call.envelope({ session: this.host.id, ...request });

  excerpt: PageCalls['excerpt'] = (request) =>
    this.services.worker.call.excerpt({ session: this.host.id, ...request });

  resume(): void {
    this.host.session.resume();
  }

  async stop(): Promise<void> {
    await this.services.worker.call.stop({ session: this.host.id });
  }

  /** Writes what the present text and recordings give. The document is saved first: the files name its digest. */
  async write(): Promise<WriteOutcome> {
    if (!vscode.workspace.isTrusted) return { files: [], findings: [untrusted()] };
    return timed(this.services.log, `write files of ${this.spot.file}`, async () => {
      await this.editing;
      if (this.document.isDirty && !(await this.document.save())) {
        return { files: [], findings: [this.notSaved()] };
      }
      this.readText();
      const files = await this.files();
      if (files === null) return { files: [], findings: this.whyNothing() };
      const outcome = await writeDesign(this.services.platform, this.spot, files);
      // Together with what a watcher sees of it, and also where nothing is watched.
      this.watch.soon();
      // Ends a step of the walkthrough, by whatever button the files were written.
      if (outcome.findings.length === 0) {
        void vscode.commands.executeCommand('setContext', 'tapwright.filesWritten', true);
      }
      return outcome;
    });
  }

  check(): ReturnType<PageCalls['check']> {
    return timed(this.services.log, `check ${this.spot.file}`, async () => {
      await this.editing;
      const outcome = await this.services.worker.call.check({ session: this.host.id, ...this.request() });
      if (!this.document.isDirty) this.services.checked?.(this.document.uri, outcome.findings);
      return outcome;
    });
  }

  /** Reads everything again; what did not change is not computed again. */
  refresh(): void {
    this.text = null;
    this.readText();
  }

  private request(): Pick<UpdateRequest, 'root' | 'place' | 'text'> {
    const { root, file, folder } = this.spot;
    return { root, place: { file, folder }, text: this.document.getText() };
  }

  private readText(): void {
    const text = this.document.getText();
    if (text === this.text) return;
    this.text = text;
    this.view = documentView(text);
    const { session } = this.host;
    session.advance();
    for (const [page, { answers }] of this.pages) page.tell(this.documentNotice(answers));
    clearTimeout(this.timer);
    if (this.view.form === null) {
      session.skip();
      return;
    }
    this.lastTakes = this.view.form.document.takes;
    this.watch.follow(this.view.form.document);
    this.timer = setTimeout(() => session.run(), quiet);
  }

  private documentNotice(answers: number): ToPage {
    return { type: 'document', generation: this.host.session.generation, answers, ...this.view };
  }

  /** Files that the present generation would be written to; null where there are none. */
  async files() {
    const { session, id } = this.host;
    for (let i = 0; i < mostTries; i++) {
      await session.partSettled('firmware');
      const { generation } = session;
      const files = await this.services.worker.call.files({ session: id, generation });
      if (generation === session.generation) return files;
    }
    return null;
  }

  private whyNothing() {
    const blockers = this.view.findings.filter(({ severity }) => severity === 'blocker');
    const text = vscode.l10n.t('There is no design to write: the findings say why, or it was stopped.');
    return blockers.length > 0 ? blockers : [hostFinding('no-design', text)];
  }

  private notSaved() {
    const text = vscode.l10n.t('The pairing document could not be saved, so nothing was written.');
    return hostFinding('not-saved', text, this.spot.file);
  }
}

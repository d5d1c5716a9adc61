import type { FromWorker, ToPage } from '../../core/protocol/messages';
import type { Part } from '../../core/protocol/views';
import type { SessionEars } from '../workerClient';
import { PartMemory } from './partMemory';

export interface SessionWork {
  /** Asks the worker to compute this generation. */
  begin(generation: number): Promise<unknown>;
  /** A bug or a dead worker, in words for the page. */
  wordsFor(kind: 'failed' | 'restarted' | 'lost', why: string): string;
  /** What is being done, for the status bar; null: nothing. */
  showBusy(busy: { what: string; share: number } | null): void;
}

type Busy = Extract<FromWorker, { type: 'busy' }>;

/** What one document computes and the pages that watch it. Knows nothing of where it runs. */
export class Session implements SessionEars {
  private readonly pages = new Set<(notice: ToPage) => void>();
  private readonly memory = new PartMemory();
  private readonly waiting = new Set<() => void>();
  private current = 0;
  /** Counts what was begun, so that an answer to something earlier is told from one that counts. */
  private runs = 0;
  private state: 'new' | 'running' | 'idle' | 'stopped' = 'new';
  private busy: Busy | null = null;
  private trouble: string | null = null;
  private retried = false;

  constructor(private readonly work: SessionWork) {}

  get generation(): number {
    return this.current;
  }

  /** A page that is ready hears everything that was said; the result ends that. */
  addPage(page: (notice: ToPage) => void): () => void {
    this.pages.add(page);
    for (const notice of this.memory.replay()) page(notice);
    if (this.busy !== null) page(busyNotice(this.busy));
    if (this.trouble !== null) page({ type: 'trouble', text: this.trouble });
    if (this.isSettled()) page(this.idleNotice());
    return () => this.pages.delete(page);
  }

  tell(notice: ToPage): void {
    for (const page of this.pages) page(notice);
  }

  /** What was computed is out of date; nothing is begun yet. */
  advance(): void {
    this.current++;
    this.state = 'new';
    this.retried = false;
  }

  /** Computes the present generation, once more if need be. */
  run(): void {
    const run = ++this.runs;
    this.state = 'running';
    const begin = async () => this.work.begin(this.current);
    begin().catch((error) => {
      if (run !== this.runs) return;
      this.setTrouble(this.work.wordsFor('failed', messageOf(error)));
      this.settle('stopped');
    });
  }

  /** The same on the user's word, after something went wrong. */
  resume(): void {
    this.retried = false;
    this.run();
  }

  /** Nothing can be computed of the present generation. */
  skip(): void {
    this.runs++;
    this.settle('idle');
  }

  /** Resolves once the part is there of the present generation, or of one that came meanwhile, or will not come. */
  partSettled(part: Part): Promise<void> {
    const isThere = () =>
      this.isSettled() || (this.state === 'running' && this.memory.has(part, this.current));
    if (isThere()) return Promise.resolve();
    return new Promise((resolve) => {
      const look = () => {
        if (!isThere()) return;
        this.waiting.delete(look);
        resolve();
      };
      this.waiting.add(look);
    });
  }

  hear(notice: FromWorker): void {
    if (notice.type === 'part') {
      const { session, ...part } = notice;
      this.memory.keep(part);
      this.tell(part);
      for (const look of [...this.waiting]) look();
    } else if (notice.type === 'busy') {
      // What is left of work that was given up.
      if (this.state !== 'running') return;
      this.busy = notice;
      this.work.showBusy(notice);
      this.tell(busyNotice(notice));
    } else if (notice.generation === this.current) {
      if (!notice.stopped) {
        this.retried = false;
        this.setTrouble(null);
      }
      this.settle(notice.stopped ? 'stopped' : 'idle');
    }
  }

  lost(why: string): void {
    this.runs++;
    if (this.state === 'new') return;
    if (this.retried) {
      this.setTrouble(this.work.wordsFor('lost', why));
      this.settle('stopped');
      return;
    }
    this.retried = true;
    this.setTrouble(this.work.wordsFor('restarted', why));
    this.run();
  }

  /** Ends what waits; the worker is told elsewhere. */
  dispose(): void {
    this.settle('stopped');
    this.pages.clear();
  }

  private isSettled(): boolean {
    return this.state === 'idle' || this.state === 'stopped';
  }

  private settle(state: 'idle' | 'stopped'): void {
    this.state = state;
    this.busy = null;
    this.work.showBusy(null);
    this.tell(this.idleNotice());
    for (const look of [...this.waiting]) look();
  }

  private idleNotice(): ToPage {
    return { type: 'idle', generation: this.current, stopped: this.state === 'stopped' };
  }

  private setTrouble(text: string | null): void {
    if (text === this.trouble) return;
    this.trouble = text;
    this.tell({ type: 'trouble', text });
  }
}

function busyNotice({ part, what, share }: Busy): ToPage {
  return { type: 'busy', part, what, share };
}

function messageOf(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}

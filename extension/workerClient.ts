import type { FromWorker, HostCalls, WorkerCalls } from '../core/protocol/messages';
import { type Link, link, type Remote } from '../core/protocol/rpc';
import type { WorkerPort } from './platform';

/** What a session hears. */
export interface SessionEars {
  hear(notice: FromWorker): void;
  /** The worker is gone with all that it knew; calls that waited have failed. The next call starts another. */
  lost(why: string): void;
}

/** The host's end of the worker: starts it with the first call, and again with the first call after it died. */
export class WorkerClient {
  private readonly sessions = new Map<string, SessionEars>();
  private running: { port: WorkerPort; link: Link<WorkerCalls> } | null = null;
  private ended = false;

  /** @param own answers what the worker asks of the host */
  constructor(
    private readonly startWorker: () => WorkerPort,
    private readonly own: HostCalls,
    private readonly died: (why: string) => void,
  ) {}

  /** The worker's calls. */
  get call(): Remote<WorkerCalls> {
    return this.start().call;
  }

  /** Gives a session's notices to the ears until it is left. */
  join(session: string, ears: SessionEars): void {
    this.sessions.set(session, ears);
  }

  leave(session: string): void {
    if (!this.sessions.delete(session) || this.running === null) return;
    this.running.link.call.forget({ session }).catch(() => {
      // It died: then it has forgotten.
    });
  }

  dispose(): void {
    this.ended = true;
    this.running?.port.terminate();
    this.running?.link.fail('the worker was ended');
    this.running = null;
  }

  private start(): Link<WorkerCalls> {
    if (this.running !== null) return this.running.link;
    if (this.ended) throw new Error('the worker was ended');
    const port = this.startWorker();
    const joined = link<WorkerCalls, HostCalls>(port, this.own, (notice: FromWorker) => {
      if (this.running?.port === port) this.sessions.get(notice.session)?.hear(notice);
    });
    this.running = { port, link: joined };
    port.onDeath((why) => this.bury(port, why));
    return joined;
  }

  private bury(port: WorkerPort, why: string): void {
    if (this.running?.port !== port) return;
    const { link: joined } = this.running;
    this.running = null;
    joined.fail(why);
    port.terminate();
    this.died(why);
    for (const ears of [...this.sessions.values()]) ears.lost(why);
  }
}

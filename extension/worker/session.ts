import type { NewSha256 } from '../../core/bytes/sha256';
import { designFiles } from '../../core/files/designFiles';
import { Refusal } from '../../core/findings/finding';
import { newPace, Stopped } from '../../core/pace';
import type { Host } from '../../core/pipeline/host';
import { inspectRecording } from '../../core/pipeline/inspect';
import { newKeep } from '../../core/pipeline/keep';
import { prepareQuick } from '../../core/pipeline/quickFigures';
import { recordingSpectrum } from '../../core/pipeline/recordingSpectrum';
import type { FromWorker, InspectRequest, UpdateRequest, WrittenFile } from '../../core/protocol/messages';
import { type Packed, pack, samePacked } from '../../core/protocol/pack';
import type { Part } from '../../core/protocol/views';
import { recordingView } from '../../core/view/recordingView';
import { type Computed, compute, type Send } from './computation';
import type { Precedence } from './precedence';
import type { RootFiles } from './rootFiles';
import { newUrgent } from './urgent';

/** One editor's work: the last request wins, and what was computed is kept for the next. */
export interface Session {
  /** Settles when the request is done, overtaken or stopped. @throws a bug */
  update(request: UpdateRequest): Promise<void>;
  inspect(request: InspectRequest): Promise<void>;
  stop(): void;
  /** Runs between two blocks of whatever is being computed, so that nothing reads a file while something else does. */
  urgent<T>(work: () => Promise<T>): Promise<T>;
  readonly left: SessionResults;
  files(generation: number): WrittenFile[] | null;
  close(): Promise<void>;
}

export interface SessionResults extends Computed {
  /** Of a recording by itself. */
  recording: Awaited<ReturnType<typeof inspectRecording>> | null;
  generation: number;
}

/** Results of a stage that are kept: so that going back and forth between a few values is quick. */
const keptEntries = 4;

/** Fits hold matrices, sums of blocks and opened files are as many as the document has. */
const keptByStage = { fit: 2, blocks: 1, spectra: 2, opened: 64, survey: 64 };

type Report = (what: string, done: number, total: number) => void;

/** Milliseconds after which a session that is held up looks again. */
const betweenLooks = 30;

/** Milliseconds between two reports of progress. */
const betweenReports = 100;

/**
 * @param openRoot the files below a root
 * @param precedence among all sessions of the worker
 * @param tell gets the parts of results and the progress
 */
export function newSession(
  session: string,
  openRoot: (root: UpdateRequest['root']) => RootFiles,
  newSha256: NewSha256,
  precedence: Precedence,
  tell: (notice: FromWorker, transfer: ArrayBuffer[]) => void,
): Session {
  const keep = newKeep(keptEntries, keptByStage);
  const urgent = newUrgent();
  const sent = new Map<Part, Packed>();
  const left: SessionResults = {
    read: null,
    fit: null,
    result: null,
    current: false,
    measured: null,
    quick: null,
    slow: false,
    recording: null,
    generation: 0,
  };
  let files: { of: string; opened: RootFiles } | null = null;
  let wanted = 0;
  let stopped = false;
  let running: Promise<void> = Promise.resolve();

  const filesOf = async (root: UpdateRequest['root']): Promise<RootFiles> => {
    const of = JSON.stringify(root);
    if (files?.of === of) return files.opened;
    await files?.opened.close();
    files = { of, opened: openRoot(root) };
    return files.opened;
  };

  /** Does work once what is running has given way, as long as its generation is the wanted one. */
  const queue = (
    { generation, root }: Pick<UpdateRequest, 'generation' | 'root'>,
    report: Report,
    work: (host: Host) => Promise<void>,
  ): Promise<void> => {
    const before = running;
    running = (async () => {
      await before.catch(() => {});
      if (wanted !== generation) return;
      const opened = await filesOf(root);
      const isOver = () => stopped || wanted !== generation;
      const pace = newPace(isOver, report, async () => {
        await urgent.drain();
        while (precedence.isHeldUp(session) && !isOver()) {
          await new Promise((turn) => setTimeout(turn, betweenLooks));
          await urgent.drain();
        }
      });
      await urgent.begin();
      try {
        await work({ open: opened.open, newSha256, pace, keep });
      } finally {
        await urgent.end();
      }
    })();
    return running;
  };

  /** Answers a request, with its progress and its end. */
  const run = (
    request: Pick<UpdateRequest, 'generation' | 'root'>,
    work: (host: Host, send: Send, begin: (part: Part) => void) => Promise<void>,
  ): Promise<void> => {
    const { generation } = request;
    wanted = generation;
    stopped = false;
    let part: Part = 'recordings';
    let reported = 0;
    const busy = (what: string, share: number) => tell({ type: 'busy', session, part, what, share }, []);
    const report: Report = (what, done, total) => {
      const now = performance.now();
      if (now - reported < betweenReports) return;
      reported = now;
      busy(what, total > 0 ? Math.min(1, done / total) : 0);
    };
    precedence.begin(session);
    return queue(request, report, async (host) => {
      try {
        await work(host, sender(generation), (next) => {
          part = next;
          busy('', 0);
        });
        tell({ type: 'idle', session, generation, stopped: false }, []);
      } catch (error) {
        if (!(error instanceof Stopped)) throw error;
        if (wanted === generation) tell({ type: 'idle', session, generation, stopped: true }, []);
      }
    }).finally(() => {
      if (wanted === generation) precedence.end(session);
    });
  };

  /** A part that is what it was before is not sent again. */
  const sender =
    (generation: number): Send =>
    (part, view) => {
      const head = { type: 'part', session, part, generation } as const;
      if (view === null) {
        sent.delete(part);
        tell({ ...head, view: null, failed: true }, []);
        return;
      }
      const packed = pack(view);
      const before = sent.get(part);
      if (before !== undefined && samePacked(before, packed)) {
        tell({ ...head, view: null }, []);
        return;
      }
      sent.set(part, packed);
      const copy = packed.series.slice(0);
      tell({ ...head, view: { json: packed.json, series: copy } }, [copy]);
    };

  /** Where figures take long those of the next change are made ready for while nothing else is wanted. */
  const makeReady = async (host: Host) => {
    const pairing = left.read?.pairing;
    if (pairing != null) left.quick = await prepareQuick(pairing, left.quick, host);
  };

  return {
    left,
    urgent: urgent.run,
    update: (request) =>
      run(request, async (host, send, begin) => {
        left.generation = request.generation;
        await compute(host, request.text, request.place, left, send, begin);
        if (left.slow) void queue(request, () => {}, makeReady).catch(ignoreStopped);
      }),
    inspect: (request) =>
      run(request, async (host, send) => {
        left.generation = request.generation;
        left.recording = await inspectRecording(host, request.path, request.file);
        const { opened } = left.recording;
        const spectrum = opened && (await recordingSpectrum(opened.recording, host.pace));
        send('recording', recordingView(left.recording, spectrum));
      }),
    stop() {
      stopped = true;
    },
    files(generation) {
      return left.result === null || !left.current || left.generation !== generation
        ? null
        : designFiles(left.result, newSha256);
    },
    async close() {
      wanted = -1;
      precedence.end(session);
      await running.catch(() => {});
      await files?.opened.close();
    },
  };
}

/** What is made ready is given up for the next request. */
function ignoreStopped(error: unknown): void {
  if (!(error instanceof Stopped) && !(error instanceof Refusal)) throw error;
}

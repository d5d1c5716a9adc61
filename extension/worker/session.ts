import type { NewSha256 } from '../../core/bytes/sha256';
import { designFiles } from '../../core/files/designFiles';
import { newPace, Stopped } from '../../core/pace';
import type { Host } from '../../core/pipeline/host';
import { inspectRecording } from '../../core/pipeline/inspect';
import { newKeep } from '../../core/pipeline/keep';
import { recordingSpectrum } from '../../core/pipeline/recordingSpectrum';
import type { FromWorker, InspectRequest, UpdateRequest, WrittenFile } from '../../core/protocol/messages';
import { type Packed, pack, samePacked } from '../../core/protocol/pack';
import type { Part } from '../../core/protocol/views';
import { recordingView } from '../../core/view/recordingView';
import { type Computed, compute, type Send } from './computation';
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

/** Milliseconds between two reports of progress. */
const betweenReports = 100;

/**
 * @param openRoot the files below a root
 * @param tell gets the parts of results and the progress
 */
export function newSession(
  session: string,
  openRoot: (root: UpdateRequest['root']) => RootFiles,
  newSha256: NewSha256,
  tell: (notice: FromWorker, transfer: ArrayBuffer[]) => void,
): Session {
  const keep = newKeep(keptEntries, keptByStage);
  const urgent = newUrgent();
  const sent = new Map<Part, Packed>();
  const left: SessionResults = { read: null, fit: null, result: null, recording: null, generation: 0 };
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

  /** Does the work once what is running has given way. */
  const run = (
    { generation, root }: Pick<UpdateRequest, 'generation' | 'root'>,
    work: (host: Host, send: Send, begin: (part: Part) => void) => Promise<void>,
  ): Promise<void> => {
    wanted = generation;
    stopped = false;
    running = running
      .catch(() => {})
      .then(async () => {
        if (wanted !== generation) return;
        let part: Part = 'recordings';
        let reported = 0;
        const report = (what: string, done: number, total: number) => {
          const now = performance.now();
          if (now - reported < betweenReports) return;
          reported = now;
          tell({ type: 'busy', session, part, what, share: total > 0 ? Math.min(1, done / total) : 0 }, []);
        };
        const opened = await filesOf(root);
        const pace = newPace(() => stopped || wanted !== generation, report, urgent.drain);
        const host: Host = { open: opened.open, newSha256, pace, keep };
        const begin = (next: Part) => {
          part = next;
          tell({ type: 'busy', session, part, what: '', share: 0 }, []);
        };
        await urgent.begin();
        try {
          await work(host, sender(generation), begin);
          tell({ type: 'idle', session, generation, stopped: false }, []);
        } catch (error) {
          if (!(error instanceof Stopped)) throw error;
          if (wanted === generation) tell({ type: 'idle', session, generation, stopped: true }, []);
        } finally {
          await urgent.end();
        }
      });
    return running;
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

  return {
    left,
    urgent: urgent.run,
    update: (request) =>
      run(request, async (host, send, begin) => {
        left.generation = request.generation;
        await compute(host, request.text, request.place, left, send, begin);
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
      return left.result === null || left.generation !== generation
        ? null
        : designFiles(left.result, newSha256);
    },
    async close() {
      wanted = -1;
      await running.catch(() => {});
      await files?.opened.close();
    },
  };
}

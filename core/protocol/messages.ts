import type { OpenFailure } from '../pipeline/host';
import type { DocumentPlace } from '../pipeline/pairing';
import type { Seen, WrittenState } from '../pipeline/writtenState';
import type { Packed } from './pack';
import type { FindingView, FormView, Part, PlannedFile } from './views';

/** Every message between page, extension host and worker. Requests and replies go through `rpc.ts`. */

/** A change of one value of the document; `value` left out: the key is removed. */
export interface Change {
  path: (string | number)[];
  value?: unknown;
}

/** Lanes of a waveform: `input:0`, `desired`, and of the run: `target` (d[n-Δ]), `output`, `error`; of a recording: `channel:0`. */
export type Lane = string;

export interface EnvelopeRequest {
  /** Number of the take; 0 for a recording. */
  take: number;
  lanes: Lane[];
  /** Samples. */
  from: number;
  to: number;
  /** Pairs of low and high wanted, at most 8,192. */
  columns: number;
}

/** Lowest and highest value of each column of `step` samples; `step` 1: the samples themselves, low and high alike. */
export interface Envelope {
  from: number;
  step: number;
  lanes: { lane: Lane; low: Float64Array; high: Float64Array }[];
}

export interface ExcerptRequest {
  take: number;
  lanes: Lane[];
  from: number;
  /** At most 30 s after `from`. */
  to: number;
}

/** Samples for listening. */
export interface Excerpt {
  sampleRate: number;
  lanes: { lane: Lane; samples: Float64Array }[];
}

// ── page ↔ host ────────────────────────────────────────────────────────────────────────────────────────────────────

/** Told by the host; no answer. */
export type ToPage =
  | {
      type: 'hello';
      kind: 'pairing' | 'recording';
      /** File name, without folder. */
      file: string;
      /** Translations by English template; empty for English. */
      words: Record<string, string>;
      locale: string;
      /** False: writing is disabled until the workspace is trusted. */
      trusted: boolean;
    }
  | {
      type: 'document';
      generation: number;
      /** Number of the last edit of the page that this text holds. */
      answers: number;
      /** Null where the text cannot be read; the last good form stays. */
      form: FormView | null;
      findings: FindingView[];
    }
  /** `view` null: the same as that of the generation before. `failed`: it cannot be had; why stands in the findings. */
  | { type: 'part'; part: Part; generation: number; view: Packed | null; failed?: boolean }
  | { type: 'busy'; part: Part; what: string /** 0 to 1. */; share: number }
  /** Nothing is being computed; parts that did not come for this generation will not. */
  | { type: 'idle'; generation: number; stopped: boolean }
  /** A bug or a dead worker, in words; null: over. */
  | { type: 'trouble'; text: string | null }
  | { type: 'trusted'; trusted: boolean }
  /** Leads to a section, as the palette's commands ask. */
  | { type: 'show'; section: string };

/** What the page asks of the host; every call is answered. */
export interface PageCalls {
  /** The page is there (again): the host says everything once more. */
  ready(state: null): Promise<null>;
  edit(edit: { number: number; changes: Change[] }): Promise<null>;
  envelope(request: EnvelopeRequest): Promise<Packed>;
  excerpt(request: ExcerptRequest): Promise<Packed>;
  /** Starts again what was stopped. */
  resume(state: null): Promise<null>;
  stop(state: null): Promise<null>;
  write(state: null): Promise<{ files: PlannedFile[]; findings: FindingView[] }>;
  check(state: null): Promise<{ state: 'current' | 'failed' | 'bad-input'; findings: FindingView[] }>;
  openAsText(position: { line: number; column: number } | null): Promise<null>;
  /** A written file or a recording, from the document's folder. */
  openFile(file: string): Promise<null>;
  /** Asks for a file and channel by the workbench's own pickers; null: nothing was chosen. */
  pickTrack(state: {
    file: string | null;
    /** What the signal is to be, for the question. */
    role?: 'input' | 'desired';
  }): Promise<{ file: string; channel: string | number } | null>;
  /** Of a recording: asks for its counterpart, writes a pairing and opens it. */
  pairWith(state: null): Promise<null>;
  openSampleBench(state: null): Promise<null>;
  manageTrust(state: null): Promise<null>;
}

// ── host ↔ worker ──────────────────────────────────────────────────────────────────────────────────────────────────

/** Where paths are looked up: a folder of the local disk that the worker reads itself, or through the host's file system. */
export type Root = { kind: 'local'; folder: string } | { kind: 'host'; uri: string };

export interface UpdateRequest {
  session: string;
  generation: number;
  root: Root;
  place: DocumentPlace;
  text: string;
}

export interface InspectRequest {
  session: string;
  generation: number;
  root: Root;
  /** From the root. */
  path: string;
  file: string;
}

export interface WrittenFile {
  path: string;
  bytes: Uint8Array;
}

/** What a recording is, for choosing. */
export interface RecordingHead {
  path: string;
  samples: number;
  sampleRate: number | null;
  /** As a document names them. */
  channels: (string | number)[];
  /** Blockers; empty where it can be used. */
  problems: FindingView[];
}

/** How a pairing's written files stand. */
export interface WrittenView extends Omit<WrittenState, 'findings' | 'text'> {
  findings: FindingView[];
}

export interface WorkerCalls {
  /** Computes a pairing part by part; a later update of the same session ends an earlier one. */
  update(request: UpdateRequest): Promise<null>;
  /** The same for a recording by itself. */
  inspect(request: InspectRequest): Promise<null>;
  envelope(request: { session: string } & EnvelopeRequest): Promise<Packed>;
  excerpt(request: { session: string } & ExcerptRequest): Promise<Packed>;
  /** Files of the session's last design; null where there is none of that generation. */
  files(request: { session: string; generation: number }): Promise<WrittenFile[] | null>;
  check(
    request: Omit<UpdateRequest, 'generation'>,
  ): Promise<{ state: 'current' | 'failed' | 'bad-input'; findings: FindingView[] }>;
  /** The same by digests alone, without solving; null where nothing has changed since it was `seen`. */
  written(request: { root: Root; place: DocumentPlace; seen: Seen | null }): Promise<WrittenView | null>;
  /** Those of the paths that hold the recording of this digest; `size` in bytes where it is known. */
  sameRecordings(request: {
    root: Root;
    paths: string[];
    sha256: string;
    size: number | null;
  }): Promise<string[]>;
  heads(request: { root: Root; paths: string[] }): Promise<RecordingHead[]>;
  draft(request: DraftRequest): Promise<{ text: string } | { findings: FindingView[] }>;
  stop(request: { session: string }): Promise<null>;
  /** The editor was closed. */
  forget(request: { session: string }): Promise<null>;
}

export interface DraftRequest {
  root: Root;
  input: { path: string; file: string };
  desired: { path: string; file: string };
  inputChannels: string[];
  desiredChannel: string;
  job: string | null;
  title: string;
  sampleRate: number | null;
}

/** Told by the worker; no answer. */
export type FromWorker =
  | { type: 'part'; session: string; part: Part; generation: number; view: Packed | null; failed?: boolean }
  | { type: 'busy'; session: string; part: Part; what: string; share: number }
  | { type: 'idle'; session: string; generation: number; stopped: boolean };

/** What the worker asks of the host where it cannot read a root itself. */
export interface HostCalls {
  /** Size and a stamp that changes when the file does, or why it cannot be read. */
  stat(request: { uri: string; path: string }): Promise<HostStat | HostFailure>;
  read(request: { uri: string; path: string }): Promise<Uint8Array>;
}

export interface HostStat {
  size: number;
  stamp: string;
}

export type HostFailure = OpenFailure;

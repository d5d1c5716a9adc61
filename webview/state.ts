import type { ToPage } from '../core/protocol/messages';
import { unpack } from '../core/protocol/pack';
import type { FindingView, FormView, Part, Views } from '../core/protocol/views';

/** What the page knows, and how the host's messages change it. */
export interface PageState {
  kind: 'pairing' | 'recording';
  file: string;
  trusted: boolean;
  /** Of the newest document. */
  generation: number;
  /** The last that could be read. */
  form: FormView | null;
  /** False while the newest text cannot be read. */
  readable: boolean;
  /** Of the newest document. */
  findings: FindingView[];
  parts: { [P in Part]?: Kept<P> };
  busy: Map<Part, { what: string; share: number }>;
  idle: { generation: number; stopped: boolean } | null;
  /** A bug or a dead worker, in words. */
  trouble: string | null;
}

export interface Kept<P extends Part> {
  view: Views[P] | null;
  /** The generation the view is true of. */
  generation: number;
  /** The newest generation for which it could not be had; below `generation` where there is none. */
  failed: number;
  /** Changes with the view, not with the generation alone. */
  stamp: number;
}

/**
 * `fresh`: of the newest document. `computing`: an older one is shown while work goes on. `outdated`: an older one, and
 * no newer one will come. `awaited`, `missing`: nothing is there to show, and it will come or will not.
 */
export type Freshness = 'fresh' | 'computing' | 'outdated' | 'awaited' | 'missing';

export function newState(): PageState {
  return {
    kind: 'pairing',
    file: '',
    trusted: true,
    generation: 0,
    form: null,
    readable: true,
    findings: [],
    parts: {},
    busy: new Map(),
    idle: null,
    trouble: null,
  };
}

/** The state after a message. */
export function hear(state: PageState, message: ToPage): PageState {
  switch (message.type) {
    case 'hello':
      return { ...state, kind: message.kind, file: message.file, trusted: message.trusted };
    case 'document':
      return {
        ...state,
        generation: message.generation,
        form: message.form ?? state.form,
        readable: message.form !== null,
        findings: message.findings,
        busy: message.generation === state.generation ? state.busy : new Map(),
      };
    case 'part':
      return withPart(state, message);
    case 'busy':
      return { ...state, busy: new Map(state.busy).set(message.part, message) };
    case 'idle':
      return { ...state, busy: new Map(), idle: message };
    case 'trouble':
      return { ...state, trouble: message.text };
    case 'trusted':
      return { ...state, trusted: message.trusted };
    case 'show':
      return state;
  }
}

function withPart(state: PageState, { part, generation, view, failed }: Told): PageState {
  const before = state.parts[part] ?? { view: null, generation: -1, failed: -1, stamp: 0 };
  if (generation < before.generation) return state;
  const kept = failed
    ? { ...before, failed: generation }
    : view === null
      ? { ...before, generation }
      : { ...before, view: unpack<Views[typeof part]>(view), generation, stamp: before.stamp + 1 };
  const busy = new Map(state.busy);
  busy.delete(part);
  // A recording by itself has no document messages.
  const newest = Math.max(state.generation, generation);
  return { ...state, generation: newest, parts: { ...state.parts, [part]: kept }, busy };
}

type Told = Extract<ToPage, { type: 'part' }>;

/** How far what is shown of a part can be trusted. */
export function freshness(state: PageState, part: Part): Freshness {
  const kept = state.parts[part];
  const over =
    (state.idle !== null && state.idle.generation >= state.generation) ||
    !state.readable ||
    (kept?.failed ?? -1) >= state.generation;
  if (!kept || kept.view === null) return over ? 'missing' : 'awaited';
  if (kept.generation >= state.generation && kept.failed < kept.generation && state.readable) return 'fresh';
  return over ? 'outdated' : 'computing';
}

/** The view of a part, whatever its age. */
export function viewOf<P extends Part>(state: PageState, part: P): Views[P] | null {
  return (state.parts[part] as Kept<P> | undefined)?.view ?? null;
}

/** True where the newest run was stopped before its end. */
export function wasStopped({ idle, generation }: PageState): boolean {
  return idle?.stopped === true && idle.generation >= generation;
}

/** Every finding once, worst first: those of the document and those of the parts that are true of it. */
export function allFindings(state: PageState): FindingView[] {
  const lists = [state.findings];
  for (const part of ['suitability', 'choice', 'recording'] as const) {
    if (freshness(state, part) === 'fresh') lists.push(viewOf(state, part)!.findings);
  }
  const seen = new Map<string, FindingView>();
  for (const found of lists.flat()) {
    const key = JSON.stringify([found.code, found.text, found.place]);
    if (!seen.has(key)) seen.set(key, found);
  }
  const order = { blocker: 0, caution: 1, note: 2 };
  return [...seen.values()].sort((a, b) => order[a.severity] - order[b.severity]);
}

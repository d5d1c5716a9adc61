import type { WrittenView } from '../../../core/protocol/messages';
import type { FindingView } from '../../../core/protocol/views';
import type { Entry } from '../../../extension/beside/standing';

/** A view of a pairing in `fir` whose files lie in `fir/generated`. */
export function viewOf(change: Partial<WrittenView>): WrittenView {
  return {
    state: 'current',
    findings: [],
    overLimit: [],
    symbol: 'belt',
    tapsFile: 'fir/generated/belt.taps.json',
    others: ['fir/generated/belt_taps.h', 'fir/generated/belt_vectors.h', 'fir/generated/belt.note.md'],
    seen: { stamps: { 'fir/slow.csv': '1' }, digests: {}, sizes: {} },
    ...change,
  };
}

export function entryOf(document: string, view: WrittenView | null = null): Entry {
  return { document, root: 'root', folder: 'fir', file: document, view, checked: null };
}

/** A blocker as a worker tells it. */
export function findingOf(change: Partial<FindingView>): FindingView {
  return {
    code: 'edited',
    severity: 'blocker',
    text: 'text',
    place: '',
    file: null,
    take: null,
    channel: null,
    span: null,
    path: null,
    position: null,
    ...change,
  };
}

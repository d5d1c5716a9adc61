import type { WrittenView } from '../../core/protocol/messages';
import type { FindingView } from '../../core/protocol/views';
import type { Translate } from './words';

/** How a pairing's files stand, by their digests and by the last check. */
export type Standing = WrittenView['state'] | 'different' | 'unknown';

/** What is known of one pairing of the workspace. */
export interface Entry {
  /** Address of the document. */
  document: string;
  /** Address of its root, the workspace folder. */
  root: string;
  /** From the root; '' for the root itself. */
  folder: string;
  file: string;
  /** Null: not looked at yet. */
  view: WrittenView | null;
  /** Of a check, solution and all, since the view was made; null: none. */
  checked: FindingView[] | null;
}

export function standingOf({ view, checked }: Pick<Entry, 'view' | 'checked'>): Standing {
  if (view === null) return 'unknown';
  if (view.state !== 'current' && view.state !== 'over-limit') return view.state;
  const found = (code: string) => checked?.some((one) => one.code === code) ?? false;
  if (found('different')) return 'different';
  if (found('over-limit')) return 'over-limit';
  return view.state;
}

/** The state in words, as it stands above an array. */
export function standingInWords(standing: Standing, t: Translate): string {
  switch (standing) {
    case 'unknown':
      return t('not looked at yet');
    case 'current':
      return t('current');
    case 'recording-changed':
      return t('recording changed');
    case 'document-changed':
      return t('document changed');
    case 'edited':
      return t('edited by hand');
    case 'over-limit':
      return t('over its limit');
    case 'not-written':
      return t('not all files are written');
    case 'different':
      return t('solved again, the taps differ');
    case 'bad-input':
      return t('document or recordings cannot be used');
  }
}

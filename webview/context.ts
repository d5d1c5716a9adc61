import type { Change, Envelope, EnvelopeRequest, PageCalls } from '../core/protocol/messages';
import type { Remote } from '../core/protocol/rpc';
import type { FindingView } from '../core/protocol/views';
import type { FieldBook } from './form/fieldBook';
import type { Keeper } from './keeper';
import type { PageState } from './state';

/** What every section works with. */
export interface PageContext {
  calls: Remote<PageCalls>;
  /** Sends one edit; nothing where there are no changes. */
  edit(changes: Change[]): void;
  fields: FieldBook;
  keeper: Keeper;
  /** The state after the newest message. */
  state(): PageState;
  envelope(request: EnvelopeRequest): Promise<Envelope>;
  /** Leads to what a finding is about; null where there is nothing to lead to. */
  leadTo(found: FindingView): (() => void) | null;
  /** Number of the take that is looked at. */
  take(): number;
  chooseTake(take: number): void;
  write(): void;
  /** Says a failure of a call where it belongs. */
  fail(error: unknown): void;
}

/** A part of the page that follows the state. */
export interface Section {
  element: HTMLElement;
  /** @param fill false while fields may not be overwritten, since an edit is on its way */
  update(state: PageState, fill: boolean): void;
}

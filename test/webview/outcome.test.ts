import { describe, expect, it } from 'vitest';
import type { ToPage } from '../../core/protocol/messages';
import { pack } from '../../core/protocol/pack';
import type { FormView } from '../../core/protocol/views';
import { documentView } from '../../extension/editors/documentView';
import { stillHolds, type Told } from '../../webview/outcome';
import { hear, newState, type PageState } from '../../webview/state';

const formOf = (title: string): FormView => {
  const track = { file: 'a.csv', channel: 1 };
  const takes = [{ inputs: [track], desired: track }];
  return documentView(JSON.stringify({ pairing: 1, title, job: 'cancel', takes })).form!;
};
const document = (generation: number, form: FormView | null = formOf('Belt')): ToPage => ({
  type: 'document',
  generation,
  answers: 0,
  form,
  findings: [],
});
/** The page looks at nothing else of it here. */
const firmware = (generation: number, state: string): ToPage => ({
  type: 'part',
  part: 'firmware',
  generation,
  view: pack({ state }),
});
const heard = (...messages: ToPage[]): PageState => messages.reduce(hear, newState());
const told = (matching: boolean): Told => ({
  document: JSON.stringify(formOf('Belt').document),
  generation: 1,
  matching,
  designed: true,
});

describe('what a check or a writing came to', () => {
  it('stays while the files that were written are read again, and after they were', () => {
    const before = [document(1), firmware(1, 'not-written')];
    expect(stillHolds(told(true), heard(...before, document(2)))).toBe(true);
    expect(stillHolds(told(true), heard(...before, document(2), firmware(2, 'current')))).toBe(true);
  });

  it('goes with a changed or broken document, and where the files match no more', () => {
    const before = [document(1), firmware(1, 'current')];
    expect(stillHolds(told(true), heard(...before, document(2, formOf('Another'))))).toBe(false);
    expect(stillHolds(told(true), heard(...before, document(2, null)))).toBe(false);
    expect(stillHolds(told(true), heard(...before, document(2), firmware(2, 'stale')))).toBe(false);
  });

  it('goes once there is a design where there was none to write', () => {
    const none = { ...told(false), designed: false };
    expect(stillHolds(none, heard(document(1)))).toBe(true);
    expect(stillHolds(none, heard(document(1), firmware(1, 'not-written')))).toBe(false);
  });

  it('goes with the next state where it was no success, and where no result can be had any more', () => {
    const before = [document(1), firmware(1, 'current')];
    expect(stillHolds(told(false), heard(...before))).toBe(true);
    expect(stillHolds(told(false), heard(...before, document(2)))).toBe(false);
    const idle: ToPage = { type: 'idle', generation: 2, stopped: false };
    expect(stillHolds(told(true), heard(...before, document(2), idle))).toBe(false);
  });
});

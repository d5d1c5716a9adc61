import { describe, expect, it } from 'vitest';
import type { ToPage } from '../../core/protocol/messages';
import { pack } from '../../core/protocol/pack';
import type { FiguresView, FindingView, FormView, SuitabilityView } from '../../core/protocol/views';
import { documentView } from '../../extension/editors/documentView';
import { allFindings, freshness, hear, newState, type PageState, viewOf } from '../../webview/state';
import { stripText } from '../../webview/stripText';

const track = { file: 'a.csv', channel: 1 };
const form: FormView = documentView(
  JSON.stringify({ pairing: 1, title: 'Belt', job: 'cancel', takes: [{ inputs: [track], desired: track }] }),
).form!;

const figures: FiguresView = {
  fitDb: -26.1,
  fitSamples: 1000,
  heldOutDb: -23.44,
  heldOutSamples: 500,
  trustworthy: true,
  standardErrorDb: 0.2,
  taps: 64,
  inputs: 2,
  job: 'cancel',
};

const document = (generation: number, more: object = {}): ToPage => ({
  type: 'document',
  generation,
  answers: 0,
  form,
  findings: [],
  ...more,
});
const part = (generation: number, view: FiguresView | null = figures, failed = false): ToPage => ({
  type: 'part',
  part: 'figures',
  generation,
  view: view && pack(view),
  ...(failed ? { failed } : {}),
});
const idle = (generation: number, stopped = false): ToPage => ({ type: 'idle', generation, stopped });

function heard(...messages: ToPage[]): PageState {
  return messages.reduce(hear, newState());
}

function finding(severity: FindingView['severity'], text: string): FindingView {
  const nowhere = { file: null, take: null, channel: null, span: null, path: null, position: null };
  return { code: 'low-level', severity, text, place: '', ...nowhere };
}

describe('how old what is shown is', () => {
  it('follows the generations', () => {
    expect(freshness(heard(document(1)), 'figures')).toBe('awaited');
    expect(freshness(heard(document(1), part(1)), 'figures')).toBe('fresh');
    expect(freshness(heard(document(1), part(1), document(2)), 'figures')).toBe('computing');
    expect(freshness(heard(document(1), part(1), document(2), part(2)), 'figures')).toBe('fresh');
  });

  it('knows when no newer one will come', () => {
    expect(freshness(heard(document(1), part(1), idle(1), document(2)), 'figures')).toBe('computing');
    expect(freshness(heard(document(1), part(1), document(2), idle(2)), 'figures')).toBe('outdated');
    expect(freshness(heard(document(1), idle(1)), 'figures')).toBe('missing');
    const failed = heard(document(1), part(1), document(2), part(2, null, true));
    expect(freshness(failed, 'figures')).toBe('outdated');
    expect(viewOf(failed, 'figures')?.heldOutDb).toBe(-23.44);
  });

  it('takes a part without a view as the same as before', () => {
    const state = heard(document(1), part(1), document(2), part(2, null));
    expect(freshness(state, 'figures')).toBe('fresh');
    expect(state.parts.figures?.stamp).toBe(1);
    expect(viewOf(state, 'figures')).toEqual(figures);
  });

  it('drops parts that come too late', () => {
    const newer = { ...figures, heldOutDb: -30 };
    const state = heard(document(2), part(2, newer), part(1));
    expect(viewOf(state, 'figures')?.heldOutDb).toBe(-30);
  });

  it('keeps the last form that could be read', () => {
    const broken = heard(document(1), part(1), document(2, { form: null }));
    expect(broken.form).toBe(form);
    expect(broken.readable).toBe(false);
    expect(freshness(broken, 'figures')).toBe('outdated');
  });
});

describe('the strip', () => {
  it('says the answer', () => {
    const { title, figures: shown, why } = stripText(heard(document(1), part(1)));
    expect(title).toBe('Belt · noise cancelling');
    expect(shown.map(({ text }) => text)).toEqual(['held-out −23.4 dB', '2 × 64 taps']);
    expect(shown.every((figure) => figure.freshness === 'fresh')).toBe(true);
    expect(why).toBeNull();
  });

  it('never passes an older figure off as the present one', () => {
    const computing = stripText(heard(document(1), part(1), document(2)));
    expect(computing.figures[0].freshness).toBe('computing');
    expect(computing.why).toMatch(/earlier state/);
    const stopped = stripText(heard(document(1), part(1), document(2), idle(2, true)));
    expect(stopped.why).toBe('Stopped before there was a result. The figures shown are of an earlier state.');
  });

  it('says why there is none', () => {
    const blocked = document(2, { form: null, findings: [finding('caution', 'b'), finding('blocker', 'a')] });
    expect(stripText(heard(document(1), blocked)).why).toBe('No result: a');
    expect(stripText(heard(document(1))).why).toBe('Being computed.');
  });

  it('counts findings once, and claims nothing before there was a look', () => {
    const both = [finding('caution', 'x'), finding('note', 'y')];
    const suitability: SuitabilityView = { findings: both, checks: 17, pair: null };
    const told: ToPage = { type: 'part', part: 'suitability', generation: 1, view: pack(suitability) };
    const state = heard(document(1, { findings: [both[0]] }), told);
    expect(allFindings(state)).toHaveLength(2);
    expect(stripText(state).findings).toBe('▲ 1 caution');
    expect(stripText(heard(document(1))).findings).toBe('not yet inspected');
    // Findings of an older state do not count for the newer one.
    expect(allFindings(hear(state, document(2)))).toHaveLength(0);
  });

  it('tells a wanted signal in the error apart from the worth of the filter', () => {
    const state = heard(document(1), part(1, { ...figures, trustworthy: false }));
    expect(stripText(state).figures[1].text).toMatch(/wanted signal/);
  });
});

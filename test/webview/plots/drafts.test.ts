import { beforeEach, describe, expect, it } from 'vitest';
import { type Drafts, newDrafts } from '../../../webview/plots/drafts';
import type { End, Intervals } from '../../../webview/plots/intervalEnds';

const end: End = { kind: 'fit', number: 0, end: 'to' };
const withTo = (to: number): Intervals => ({ fit: [{ from: 10, to }], heldOut: [], disturbanceOnly: [] });

describe('intervals that are being dragged', () => {
  let drafts: Drafts;
  const to = () => drafts.shown().fit[0]?.to;
  beforeEach(() => {
    drafts = newDrafts();
    drafts.set(withTo(100), 1000);
  });

  it('are told once, when the drag ends', () => {
    expect(drafts.move(end, 150.4)).toBe(150);
    expect(drafts.move(end, 5000)).toBe(1000);
    expect(drafts.moving()).toBe(true);
    expect(drafts.finish()).toEqual({ kind: 'fit', number: 0, interval: { from: 10, to: 1000 } });
    expect(drafts.finish()).toBeNull();
  });

  it('tell nothing where they came back to where they were, or were given up', () => {
    drafts.move(end, 150);
    drafts.move(end, 100);
    expect(drafts.finish()).toBeNull();
    drafts.move(end, 150);
    drafts.cancel();
    expect(drafts.finish()).toBeNull();
    expect(to()).toBe(100);
  });

  it('stay where they were let go until the document has them', () => {
    drafts.move(end, 150);
    drafts.finish();
    drafts.set(withTo(100), 1000);
    expect(to()).toBe(150);
    drafts.set(withTo(150), 1000);
    drafts.set(withTo(90), 1000);
    expect(to()).toBe(90);
  });

  it('do not jump back while the document passes through an earlier change', () => {
    drafts.move(end, 150);
    drafts.finish();
    drafts.move(end, 200);
    expect(drafts.finish()?.interval.to).toBe(200);
    drafts.set(withTo(150), 1000);
    expect(to()).toBe(200);
    drafts.set(withTo(200), 1000);
    drafts.set(withTo(150), 1000);
    expect(to()).toBe(150);
  });

  it('give way to another value of the document, and where it took none', () => {
    drafts.move(end, 150);
    drafts.finish();
    drafts.set(withTo(77), 1000);
    expect(to()).toBe(77);
    drafts.move(end, 150);
    drafts.finish();
    drafts.forget();
    expect(to()).toBe(77);
  });

  it('end where the interval is gone', () => {
    drafts.move(end, 150);
    drafts.set({ fit: [], heldOut: [], disturbanceOnly: [] }, 1000);
    expect(drafts.finish()).toBeNull();
  });
});

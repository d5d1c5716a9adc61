import { describe, expect, it } from 'vitest';
import type { ToPage } from '../../../core/protocol/messages';
import { Session } from '../../../extension/editors/session';

/** A session over a worker that this test plays. */
function newSession() {
  const begun: number[] = [];
  const busy: unknown[] = [];
  const failing: { error: Error | null } = { error: null };
  const session = new Session({
    async begin(generation) {
      begun.push(generation);
      if (failing.error !== null) throw failing.error;
    },
    wordsFor: (kind, why) => `${kind}: ${why}`,
    showBusy: (what) => busy.push(what),
  });
  const page = () => {
    const heard: ToPage[] = [];
    const leave = session.addPage((notice) => heard.push(notice));
    return { heard, leave };
  };
  return { session, begun, busy, failing, page };
}

const packed = (json: string) => ({ json, series: new ArrayBuffer(0) });
const head = { session: 's', part: 'figures' } as const;
const idle = (generation: number, stopped = false) =>
  ({ type: 'idle', session: 's', generation, stopped }) as const;

describe('a session', () => {
  it('gives a later page what the others heard, in its last form', () => {
    const { session, page } = newSession();
    session.advance();
    session.run();
    session.hear({ type: 'part', ...head, generation: 1, view: packed('one') });
    session.hear(idle(1));
    session.advance();
    session.run();
    session.hear({ type: 'part', ...head, generation: 2, view: null });
    const { heard } = page();
    expect(heard).toEqual([{ type: 'part', part: 'figures', generation: 2, view: packed('one') }]);
    session.hear(idle(2));
    expect(heard.at(-1)).toEqual({ type: 'idle', generation: 2, stopped: false });
    expect(page().heard.at(-1)).toEqual({ type: 'idle', generation: 2, stopped: false });
  });

  it('tells a part that cannot be had after the last that could', () => {
    const { session, page } = newSession();
    session.advance();
    session.run();
    session.hear({ type: 'part', ...head, generation: 1, view: packed('one') });
    session.hear({ type: 'part', ...head, generation: 2, view: null, failed: true });
    expect(page().heard).toEqual([
      { type: 'part', part: 'figures', generation: 2, view: packed('one') },
      { type: 'part', part: 'figures', generation: 2, view: null, failed: true },
    ]);
  });

  it('tells no page that has left', () => {
    const { session, page } = newSession();
    const { heard, leave } = page();
    leave();
    session.tell({ type: 'show', section: 'firmware' });
    expect(heard).toEqual([]);
  });

  it('begins once more by itself when the worker dies, and not for ever', () => {
    const { session, begun, page } = newSession();
    session.advance();
    session.run();
    const { heard } = page();
    session.lost('out of memory');
    expect(begun).toEqual([1, 1]);
    expect(heard).toEqual([{ type: 'trouble', text: 'restarted: out of memory' }]);
    session.lost('out of memory');
    expect(begun).toEqual([1, 1]);
    expect(heard.slice(1)).toEqual([
      { type: 'trouble', text: 'lost: out of memory' },
      { type: 'idle', generation: 1, stopped: true },
    ]);
    session.resume();
    expect(begun).toEqual([1, 1, 1]);
    session.hear(idle(1));
    expect(heard.slice(3)).toEqual([
      { type: 'trouble', text: null },
      { type: 'idle', generation: 1, stopped: false },
    ]);
  });

  it('begins nothing that was never asked for when the worker dies', () => {
    const { session, begun } = newSession();
    session.lost('gone');
    expect(begun).toEqual([]);
  });

  it('tells a bug, but not one of work that was overtaken', async () => {
    const { session, failing, page } = newSession();
    const { heard } = page();
    failing.error = new Error('bug');
    session.advance();
    session.run();
    failing.error = null;
    session.advance();
    session.run();
    await new Promise((resolve) => setTimeout(resolve));
    expect(heard).toEqual([]);
    failing.error = new Error('bug');
    session.run();
    await new Promise((resolve) => setTimeout(resolve));
    expect(heard[0]).toEqual({ type: 'trouble', text: 'failed: bug' });
  });

  it('is settled by its own generation only', async () => {
    const { session } = newSession();
    session.advance();
    session.run();
    session.advance();
    session.run();
    let settled = false;
    const waits = session.partSettled('firmware').then(() => {
      settled = true;
    });
    session.hear(idle(1));
    await Promise.resolve();
    expect(settled).toBe(false);
    session.hear(idle(2));
    await waits;
    expect(settled).toBe(true);
  });

  it('waits for a part no longer than until it is there', async () => {
    const { session } = newSession();
    session.advance();
    session.run();
    session.hear({ type: 'part', ...head, part: 'firmware', generation: 1, view: packed('one') });
    await session.partSettled('firmware');
    session.advance();
    const waits = session.partSettled('firmware');
    session.run();
    session.hear({ type: 'part', ...head, part: 'firmware', generation: 2, view: null, failed: true });
    await waits;
  });

  it('shows work while it lasts', () => {
    const { session, busy, page } = newSession();
    session.advance();
    session.run();
    session.hear({ type: 'busy', session: 's', part: 'choice', what: 'folds', share: 0.5 });
    expect(page().heard).toEqual([{ type: 'busy', part: 'choice', what: 'folds', share: 0.5 }]);
    session.hear(idle(1));
    expect(busy.at(-1)).toBeNull();
    expect(page().heard.some(({ type }) => type === 'busy')).toBe(false);
  });
});

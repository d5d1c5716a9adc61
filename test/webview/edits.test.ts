import { describe, expect, it } from 'vitest';
import { newEdits } from '../../webview/edits';

describe('edits of the page', () => {
  it('drops echoes of texts older than the last edit', () => {
    const edits = newEdits();
    expect(edits.accepts(0)).toBe(true);
    expect(edits.next([]).number).toBe(1);
    expect(edits.next([]).number).toBe(2);
    expect(edits.accepts(0)).toBe(false);
    expect(edits.accepts(1)).toBe(false);
    expect(edits.accepts(2)).toBe(true);
    // Undo comes with the number of the last edit.
    expect(edits.accepts(2)).toBe(true);
  });

  it('takes the text again after an edit that failed', () => {
    const edits = newEdits();
    edits.accepts(0);
    const { number } = edits.next([]);
    edits.failed(number);
    expect(edits.accepts(0)).toBe(true);
  });

  it('does not forget a later edit when an earlier one fails', () => {
    const edits = newEdits();
    edits.accepts(0);
    edits.next([]);
    edits.next([]);
    edits.failed(1);
    expect(edits.accepts(1)).toBe(false);
    expect(edits.accepts(2)).toBe(true);
  });

  it('starts over with whatever a host says first, and counts on from there', () => {
    const edits = newEdits();
    expect(edits.accepts(7)).toBe(true);
    expect(edits.next([]).number).toBe(8);
    edits.restart();
    expect(edits.accepts(0)).toBe(true);
    expect(edits.next([]).number).toBeGreaterThan(8);
  });
});

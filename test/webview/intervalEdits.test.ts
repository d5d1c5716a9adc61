import { describe, expect, it } from 'vitest';
import { readDocument } from '../../core/document/readDocument';
import type { FormView, TakeView } from '../../core/protocol/views';
import { documentView } from '../../extension/editors/documentView';
import { editedText, minimalEdits } from '../../extension/editors/minimalEdits';
import {
  addInterval,
  dragInterval,
  type IntervalKind,
  intervalRows,
  removeInterval,
  secondsOf,
  setEnd,
} from '../../webview/intervalEdits';

const rate = 800;

function textWith(keys: object): string {
  const track = { file: 'a.csv', channel: 1 };
  return JSON.stringify({
    pairing: 1,
    job: 'cancel',
    takes: [{ inputs: [track], desired: { ...track, channel: 2 }, ...keys }],
  });
}

function formOf(text: string): FormView {
  return documentView(text).form!;
}

function take(kinds: Partial<TakeView>): TakeView {
  return { name: 'take 1', samples: 19_200, tracks: [], fit: [], heldOut: [], disturbanceOnly: [], ...kinds };
}

/** The take's key after the changes, by the editor's own edits. */
function edited(text: string, changes: Parameters<typeof minimalEdits>[1], kind: IntervalKind): unknown {
  const changed = editedText(text, minimalEdits(text, changes));
  expect(readDocument(changed).document).not.toBeNull();
  return JSON.parse(changed).takes[0][kind];
}

const list = (kind: IntervalKind) => ({ take: 0, kind });

describe('edits of intervals', () => {
  it('writes one end of a single interval where it stands', () => {
    const text = textWith({ fit: { from: 0, to: 11 }, heldOut: { from: 11, to: 24 } });
    const form = formOf(text);
    const { rows, leftOut } = intervalRows(form, list('fit'), null, rate);
    expect(leftOut).toBe(false);
    expect(rows).toEqual([{ from: 0, to: 11, samples: false, path: ['takes', 0, 'fit'] }]);
    const changes = setEnd(form, list('fit'), rows, 0, 'to', 10.5);
    expect(changes).toEqual([{ path: ['takes', 0, 'fit', 'to'], value: 10.5 }]);
    expect(edited(text, changes, 'fit')).toEqual({ from: 0, to: 10.5 });
  });

  it('drags an interval of a list, in any order, and writes the ends that moved', () => {
    const text = textWith({
      fit: [
        { from: 6.2, to: 11 },
        { from: 0, to: 4.8 },
      ],
    });
    const form = formOf(text);
    const resolved = take({
      fit: [
        { from: 0, to: 3840 },
        { from: 4960, to: 8800 },
      ],
    });
    const changes = dragInterval(
      form,
      list('fit'),
      resolved.fit[1],
      { from: 5200, to: 8800 },
      resolved,
      rate,
    );
    expect(changes).toEqual([{ path: ['takes', 0, 'fit', 0, 'from'], value: 6.5 }]);
  });

  it('keeps whole samples where the entry counts in samples', () => {
    const text = textWith({ fit: { from: 0, to: 8000, samples: true } });
    const form = formOf(text);
    const resolved = take({ fit: [{ from: 0, to: 8000 }] });
    const changes = dragInterval(form, list('fit'), resolved.fit[0], { from: 3, to: 7001 }, resolved, rate);
    expect(edited(text, changes, 'fit')).toEqual({ from: 3, to: 7001, samples: true });
  });

  it('writes an interval out where the document leaves it to the default', () => {
    const text = textWith({});
    const form = formOf(text);
    const resolved = take({ fit: [{ from: 0, to: 12_800 }], heldOut: [{ from: 12_800, to: 19_200 }] });
    expect(intervalRows(form, list('fit'), resolved, rate)).toMatchObject({
      leftOut: true,
      rows: [{ from: 0, to: 16, samples: false }],
    });
    const dragged = dragInterval(form, list('fit'), resolved.fit[0], { from: 0, to: 8000 }, resolved, rate);
    expect(edited(text, dragged, 'fit')).toEqual({ from: 0, to: 10 });
    const { rows } = intervalRows(form, list('heldOut'), resolved, rate);
    const typed = setEnd(form, list('heldOut'), rows, 0, 'from', 17);
    expect(edited(text, typed, 'heldOut')).toEqual({ from: 17, to: 24 });
  });

  it('makes a list of a single interval when one is added, and adds to a list', () => {
    const one = textWith({ disturbanceOnly: { from: 0, to: 1 } });
    const added = { from: 2, to: 3, samples: false };
    const rows = intervalRows(formOf(one), list('disturbanceOnly'), null, rate).rows;
    const changes = addInterval(formOf(one), list('disturbanceOnly'), rows, added);
    expect(edited(one, changes, 'disturbanceOnly')).toEqual([
      { from: 0, to: 1 },
      { from: 2, to: 3 },
    ]);

    const two = textWith({ disturbanceOnly: [{ from: 0, to: 1 }] });
    const more = intervalRows(formOf(two), list('disturbanceOnly'), null, rate).rows;
    const grown = addInterval(formOf(two), list('disturbanceOnly'), more, added);
    expect(edited(two, grown, 'disturbanceOnly')).toEqual([
      { from: 0, to: 1 },
      { from: 2, to: 3 },
    ]);

    const none = textWith({});
    const first = addInterval(formOf(none), list('disturbanceOnly'), [], added);
    expect(edited(none, first, 'disturbanceOnly')).toEqual({ from: 2, to: 3 });
  });

  it('takes intervals out', () => {
    const text = textWith({
      fit: [
        { from: 0, to: 4 },
        { from: 5, to: 9 },
      ],
      heldOut: { from: 10, to: 12 },
    });
    const form = formOf(text);
    const fit = intervalRows(form, list('fit'), null, rate).rows;
    expect(edited(text, removeInterval(form, list('fit'), fit, 0), 'fit')).toEqual([{ from: 5, to: 9 }]);
    const held = intervalRows(form, list('heldOut'), null, rate).rows;
    // Without the key the last third would be held out again.
    expect(edited(text, removeInterval(form, list('heldOut'), held, 0), 'heldOut')).toEqual([]);
  });

  it('writes the shortest seconds that mean the sample', () => {
    expect(secondsOf(8800, 800)).toBe(11);
    expect(secondsOf(1, 44_100)).toBe(0.00002);
    const samples = Array.from({ length: 2000 }, (_, i) => (i * 7919) % 26_460_000);
    expect(samples.filter((n) => Math.floor(secondsOf(n, 44_100) * 44_100 + 0.5) !== n)).toEqual([]);
  });
});

import { describe, expect, it } from 'vitest';
import { sentences } from '../../core/findings/sentences';
import type { FindingView, TakeView } from '../../core/protocol/views';
import { documentView } from '../../extension/editors/documentView';
import { findingsAtFields } from '../../webview/form/atFields';
import { anchorCodes, leadOf, pathsOf } from '../../webview/leads';
import { nearestPlace } from '../../webview/paths';

const takes: TakeView[] = ['slow', 'fast'].map((name) => ({
  name,
  samples: 100,
  tracks: [{ role: 'desired', index: 0, file: `${name}.csv`, channel: '1', min: 0, max: 1 }],
  fit: [],
  heldOut: [],
  disturbanceOnly: [],
}));

function found(more: Partial<FindingView>): FindingView {
  const nowhere = { file: null, take: null, channel: null, span: null, path: null, position: null };
  return { code: 'clipped', severity: 'caution', text: '', place: '', ...nowhere, ...more };
}

const fields = [
  ['filter', 'length'],
  ['takes', 0, 'fit'],
  ['takes', 0, 'fit', 'to'],
];
const everywhere = () => true;

describe('where a finding leads', () => {
  it('shows samples in their take', () => {
    const span = { from: 3, to: 5 };
    expect(leadOf(found({ span, file: 'fast.csv' }), fields, takes, everywhere)).toEqual({
      kind: 'lanes',
      take: 1,
      span,
    });
    expect(leadOf(found({ span, take: 'slow' }), fields, takes, everywhere)).toMatchObject({ take: 0 });
  });

  it('finds the nearest field', () => {
    expect(nearestPlace(fields, ['takes', 0, 'fit', 'to'])).toEqual(['takes', 0, 'fit', 'to']);
    expect(nearestPlace(fields, ['takes', 0, 'fit', 'from'])).toEqual(['takes', 0, 'fit']);
    expect(nearestPlace(fields, ['filter'])).toEqual(['filter', 'length']);
    expect(nearestPlace(fields, ['takes', 1])).toBeNull();
    expect(nearestPlace(fields, [])).toBeNull();
  });

  it('turns to the take that a value belongs to', () => {
    const path = ['takes', 1, 'desired', 'channel'];
    expect(leadOf(found({ path }), fields, takes, everywhere)).toEqual({ kind: 'take', take: 1, path });
  });

  it('gives a file that cannot be used the path of the signal that names it', () => {
    const track = (file: string) => ({ file, channel: 1 });
    const text = { pairing: 1, job: 'cancel', takes: [{ inputs: [track('a')], desired: track('b') }] };
    const { form } = documentView(JSON.stringify(text));
    const missing = found({ severity: 'blocker', file: 'b', path: [] });
    expect(pathsOf([missing], form)[0].path).toEqual(['takes', 0, 'desired']);
    const caution = found({ file: 'b' });
    expect(pathsOf([caution], form)).toEqual([caution]);
  });

  it('falls back to a plot, then to the text, then to nothing', () => {
    const position = { line: 3, column: 1 };
    expect(leadOf(found({ code: 'drift', position }), fields, takes, everywhere)).toEqual({
      kind: 'anchor',
      anchor: 'timing',
    });
    expect(leadOf(found({ code: 'drift', position }), fields, takes, () => false)).toEqual({
      kind: 'text',
      position,
    });
    expect(leadOf(found({ code: 'drift' }), fields, takes, () => false)).toBeNull();
  });

  it('names only codes that there are', () => {
    expect(anchorCodes().filter((code) => !(code in sentences))).toEqual([]);
  });

  it('gives findings to the fields that show them', () => {
    const length = found({ path: ['filter', 'length'] });
    const other = found({ path: ['unknown'] });
    const byField = findingsAtFields(fields, [length, other, found({})]);
    expect([...byField]).toEqual([['filter/length', [length]]]);
  });
});

import { assert, property, string } from 'fast-check';
import { describe, expect, it } from 'vitest';
import { visible } from '../../../core/figures/visible';
import { name, plain, table, target } from '../../../core/note/markdown';
import { hostileNames } from '../../support/hostileNames';

/** What a Markdown renderer makes of numeric character references (CommonMark 0.31, 2.5). */
function decoded(text: string): string {
  return text.replace(/&#(\d+);/g, (_, code: string) => String.fromCharCode(Number(code)));
}

describe('text from documents in Markdown', () => {
  it('leaves ordinary titles as they are', () => {
    expect(plain('Checkweigher belt - line 3 (rev. 2), frame_x')).toBe(
      'Checkweigher belt - line 3 (rev. 2), frame_x',
    );
  });

  it('has no character that opens or closes markup, and reads as the text', () => {
    assert(
      property(string({ unit: 'binary' }), (text) => {
        const written = plain(text);
        expect(written.replace(/&#\d+;/g, '')).not.toMatch(/[\\`*[\]<>|~$\n\r]|\b_|_\b|:\/\/|www\.|[&#]/i);
        expect(decoded(written)).toBe(visible(text));
      }),
    );
  });

  it.each(hostileNames)('sets the name %j as code that ends where it should, or as plain text', (hostile) => {
    const written = name(hostile);
    if (written.startsWith('`')) {
      expect(written.slice(1, -1)).toBe(visible(hostile));
      expect(written.slice(1, -1)).not.toMatch(/[`|\\\n]|^\s|\s$/);
    } else {
      expect(written).toBe(plain(hostile));
    }
  });

  it('keeps a table row one row with as many cells as the head', () => {
    const rows = hostileNames.map((hostile) => [name(hostile), plain(hostile)]);
    const lines = table(['a', 'b'], rows, ['b']).split('\n');
    expect(lines).toHaveLength(hostileNames.length + 2);
    for (const line of lines) expect(line.match(/\|/g)).toHaveLength(3);
    expect(lines[1]).toBe('| --- | --: |');
  });

  it('writes targets of links that no character ends early', () => {
    for (const hostile of hostileNames) expect(target(`${hostile}/impulse.svg`)).toMatch(/^[\w.~%/-]+$/);
    expect(target('belt.note/impulse.svg')).toBe('belt.note/impulse.svg');
    expect(target('line (3).note/a.svg')).toBe('line%20%283%29.note/a.svg');
  });
});

import { describe, expect, it } from 'vitest';
import { fill, isOpen, newTyping, ownsUndo, restore } from '../../webview/form/typing';

const key = (name: string) => ({ key: name, ctrlKey: true, metaKey: false, altKey: false });
const kept = { ...newTyping(), kept: '64', typed: '64' };

describe('typing in a field', () => {
  it('takes what the document says while nothing is typed, focused or not', () => {
    expect(fill(kept, '32').typed).toBe('32');
    expect(fill({ ...kept, focused: true }, '32').typed).toBe('32');
  });

  it('keeps what is being typed', () => {
    const typing = { ...kept, focused: true, typed: '6' };
    const after = fill(typing, '32');
    expect(after).toMatchObject({ typed: '6', kept: '32' });
    expect(restore(after).typed).toBe('32');
  });

  it('keeps a refused text until the document has another value', () => {
    const wrong = { ...kept, typed: 'long', wrong: true };
    expect(fill(wrong, '64')).toMatchObject({ typed: 'long', wrong: true });
    expect(fill(wrong, '48')).toMatchObject({ typed: '48', wrong: false });
  });

  it('keeps undo to itself only while it has text of its own', () => {
    expect(isOpen(kept)).toBe(false);
    expect(ownsUndo(kept, key('z'))).toBe(false);
    expect(ownsUndo({ ...kept, typed: '6' }, key('z'))).toBe(true);
    expect(ownsUndo({ ...kept, typed: '6' }, key('Z'))).toBe(true);
    expect(ownsUndo({ ...kept, typed: '6' }, key('s'))).toBe(false);
  });
});

import { describe, expect, it } from 'vitest';
import { keepNothing, newKeep } from '../../../core/pipeline/keep';

describe('newKeep', () => {
  const counter = () => {
    let made = 0;
    return async () => ++made;
  };

  it('makes a result once for each key, and the oldest again where there are too many', async () => {
    const keep = newKeep(2);
    const make = counter();
    const asked = [];
    for (const key of ['a', 'b', 'a', 'c', 'a', 'b']) asked.push(await keep('sums', [key], make));
    // c pushes out b, which was used longer ago than a.
    expect(asked).toEqual([1, 2, 1, 3, 1, 4]);
  });

  it('does not mix stages, and keeps as many of one as is asked', async () => {
    const keep = newKeep(1, { opened: 3 });
    const make = counter();
    expect(await keep('opened', 1, make)).toBe(1);
    expect(await keep('sums', 1, make)).toBe(2);
    await keep('opened', 2, make);
    await keep('opened', 3, make);
    expect(await keep('opened', 1, make)).toBe(1);
  });

  it('keeps nothing of a stage that failed', async () => {
    const keep = newKeep(2);
    const failing = () => Promise.reject(new Error('stopped'));
    await expect(keep('sums', 1, failing)).rejects.toThrow('stopped');
    expect(await keep('sums', 1, async () => 'made')).toBe('made');
  });

  it('can keep nothing at all', async () => {
    const make = counter();
    await keepNothing('sums', 1, make);
    expect(await keepNothing('sums', 1, make)).toBe(2);
  });
});

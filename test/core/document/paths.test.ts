import { posix } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { resolveInside } from '../../../core/document/paths';

describe('a path from the document', () => {
  it.each([
    ['', 'a.csv', 'a.csv'],
    ['.', 'a.csv', 'a.csv'],
    ['b', 'a.csv', 'b/a.csv'],
    ['b/c', '../a.csv', 'b/a.csv'],
    ['b/c/', './x//y/../a.csv', 'b/c/x/a.csv'],
    ['b', '..', ''],
    ['', '.', ''],
    ['b', '.../a.csv', 'b/.../a.csv'],
    ['b', '%2e%2e/a.csv', 'b/%2e%2e/a.csv'],
  ])('from %j to %j is %j', (folder, path, expected) => {
    expect(resolveInside(folder, path)).toBe(expected);
  });

  it.each([
    ['', '..'],
    ['', '../a.csv'],
    ['b', '../../a.csv'],
    ['b', '../../b/a.csv'],
    ['b', 'x/../../../b/a.csv'],
    ['b', '/b/a.csv'],
    ['b', 'C:/a.csv'],
    ['b', 'file:a.csv'],
    ['b', '..\\..\\a.csv'],
    ['b', 'a\0.csv'],
    ['..', 'a.csv'],
  ])('from %j to %j leaves the root', (folder, path) => {
    expect(resolveInside(folder, path)).toBe(null);
  });

  it('agrees with Node on where it leads, and is stricter on leaving', () => {
    const parts = fc.array(fc.constantFrom('a', 'b', '..', '.', '', '.x', 'y..'), {
      minLength: 1,
      maxLength: 8,
    });
    fc.assert(
      fc.property(parts, parts, (folder, path) => {
        const from = folder
          .filter((part) => part !== '..')
          .join('/')
          .replace(/^\/+/, '');
        const to = path.join('/');
        const found = resolveInside(from, to);
        const node = posix.join('/top', from, to).replace(/\/$/, '');
        if (to.startsWith('/')) expect(found).toBe(null);
        else if (node !== '/top' && !node.startsWith('/top/')) expect(found).toBe(null);
        else if (found !== null) expect(posix.join('/top', found)).toBe(node);
      }),
      { numRuns: 1000, seed: 1 },
    );
  });
});

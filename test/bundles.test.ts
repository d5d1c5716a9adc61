import { existsSync, readFileSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

// What was built last (`npm test` builds first).

const dist = join(__dirname, '..', 'dist');

const limits: Record<string, number> = {
  'extension.js': 400_000,
  'worker.js': 400_000,
  'web/extension.js': 400_000,
  'web/worker.js': 400_000,
  'page.js': 450_000,
};

describe('the bundles', () => {
  for (const [file, limit] of Object.entries(limits)) {
    it(`keep ${file} within ${limit / 1000} kB`, () => {
      const path = join(dist, file);
      expect(existsSync(path), `${file} was not built`).toBe(true);
      expect(statSync(path).size).toBeLessThanOrEqual(limit);
    });
  }

  it('for the browser ask for no module of Node', () => {
    for (const file of ['web/extension.js', 'web/worker.js']) {
      const asked = [...readFileSync(join(dist, file), 'utf8').matchAll(/\brequire\("([^"]+)"\)/g)];
      expect(asked.map((match) => match[1]).filter((name) => name !== 'vscode')).toEqual([]);
    }
  });

  it('run without the sources of the project', () => {
    for (const file of ['extension.js', 'worker.js']) {
      const asked = [...readFileSync(join(dist, file), 'utf8').matchAll(/\brequire\("([^"]+)"\)/g)];
      const others = asked.map((match) => match[1]).filter((name) => !/^(node:|vscode$)/.test(name));
      expect(others).toEqual([]);
    }
  });
});

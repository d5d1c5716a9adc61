import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { sentences, tables } from '../core/findings/sentences';

// What the linter's rules cannot say about the house.

const project = join(__dirname, '..');
const tracked = execFileSync('git', ['ls-files', '--cached', '--others', '--exclude-standard'], {
  cwd: project,
})
  .toString()
  .split('\n')
  .filter((file) => file !== '');
const sources = tracked.filter((file) => /\.m?ts$/.test(file));
const text = (file: string) => readFileSync(join(project, file), 'utf8');

describe('the house', () => {
  it('has no folders beside extension, webview, core, test and media', () => {
    const folders = new Set(tracked.filter((file) => file.includes('/')).map((file) => file.split('/')[0]));
    const known = ['.ci', 'core', 'extension', 'media', 'test', 'webview'];
    expect([...folders].filter((folder) => !known.includes(folder))).toEqual([]);
  });

  it('has no checked-in JavaScript', () => {
    expect(tracked.filter((file) => /\.[cm]?js$/.test(file))).toEqual([]);
  });

  it('raises nothing to a power in place where taps and integers are made, which the linter plugin cannot see', () => {
    const exact = sources.filter(
      (file) => file.startsWith('core/') && !/^core\/(figures|note|view)\//.test(file),
    );
    expect(exact.length).toBeGreaterThan(50);
    expect(exact.filter((file) => text(file).includes('**='))).toEqual([]);
  });

  it('imports d3 only where pictures are drawn', () => {
    const drawing = sources.filter((file) => /^import .* from 'd3-/m.test(text(file)));
    expect(drawing.filter((file) => !file.startsWith('core/note/'))).toEqual([]);
  });
});

describe('the table of sentences', () => {
  it('has every code once', () => {
    expect(Object.keys(sentences).length).toBe(
      tables.reduce((sum, rows) => sum + Object.keys(rows).length, 0),
    );
  });

  it('has no code that is never found', () => {
    const code = sources.filter((file) => file.startsWith('core/') || file.startsWith('extension/'));
    const used = code
      .filter((file) => !/Sentences\.ts$/.test(file))
      .map(text)
      .join('\n');
    expect(Object.keys(sentences).filter((name) => !used.includes(`'${name}'`))).toEqual([]);
  });
});

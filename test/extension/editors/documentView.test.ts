import { describe, expect, it } from 'vitest';
import { documentView } from '../../../extension/editors/documentView';
import { pageHtml } from '../../../extension/editors/pageHtml';
import { watchedFiles } from '../../../extension/editors/watchedFiles';

const text = JSON.stringify(
  {
    pairing: 1,
    job: 'cancel',
    takes: [
      {
        name: 'slow',
        inputs: [{ file: '../raw/slow.csv', channel: 'x' }],
        desired: { file: 'slow.csv', channel: 1 },
      },
    ],
    filter: { length: 8 },
    write: { folder: 'out', symbol: 'belt' },
    mine: true,
  },
  null,
  2,
);

describe('what the form shows of a text', () => {
  it('is the document with its defaults, and what the text gives by itself', () => {
    const { form, findings } = documentView(text);
    expect(form?.document.filter).toMatchObject({ length: 8, delay: 0 });
    expect(form?.given).toContain('filter/length');
    expect(form?.given).toContain('takes/0/inputs/0/channel');
    expect(form?.given).not.toContain('filter/delay');
    expect(findings.map(({ code, severity }) => [code, severity])).toEqual([['unknown-key', 'note']]);
  });

  it('is nothing where the text is broken, with the place of the fault', () => {
    const { form, findings } = documentView(text.replace('"job": "cancel",', '"job": "cancel"'));
    expect(form).toBeNull();
    expect(findings[0]).toMatchObject({ code: 'broken-json', position: { line: 4, column: 3 } });
  });

  it('is nothing where a value cannot be, with the path of its field', () => {
    const { form, findings } = documentView(text.replace('8', '-8'));
    expect(form).toBeNull();
    expect(findings[0].path).toEqual(['filter', 'length']);
  });
});

describe('the files of a document', () => {
  it('are watched where they lie, recordings by name and written files by how they start', () => {
    const { document } = documentView(text).form!;
    expect(watchedFiles(document, 'pairs', 'belt.pairing.json')).toEqual([
      { folder: 'raw', files: ['slow.csv'], starts: [] },
      { folder: 'pairs', files: ['slow.csv'], starts: [] },
      { folder: 'pairs/out', files: [], starts: ['belt.taps.', 'belt.note.', 'belt_'] },
      { folder: 'pairs/out/belt.note', files: [], starts: [''] },
    ]);
    // What would leave the root is not watched.
    expect(watchedFiles(document, '', 'belt.pairing.json').map(({ folder }) => folder)).not.toContain('raw');
  });
});

describe("the page's frame", () => {
  it('lets nothing load but what the build made, and cannot be broken out of', () => {
    const html = pageHtml({
      nonce: 'abc',
      source: 'https://*.example',
      script: 'x"><script>',
      style: 'page.css',
      language: 'de"',
    });
    const policy = /Content-Security-Policy" content="([^"]*)"/.exec(html)![1];
    expect(policy).toBe(
      "default-src 'none'; script-src 'nonce-abc'; style-src https://*.example 'nonce-abc'",
    );
    expect(html).not.toContain('x">');
    expect(html.match(/<script/g)?.length).toBe(1);
  });
});

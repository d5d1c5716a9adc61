import { describe, expect, it } from 'vitest';
import { findingJson } from '../../../core/files/tapsJson';
import { type Finding, finding } from '../../../core/findings/finding';
import { problemLine } from '../../../core/findings/problemLine';
import { type FindingCode, sentences } from '../../../core/findings/sentences';
import { designNote } from '../../../core/note/designNote';
import { findingView } from '../../../core/view/findingView';
import { hostileNames } from '../../support/hostileNames';
import { sampleResult } from '../../support/sampleResult';

// Every sentence with every name in it being hostile, in every place where sentences are shown.

const hidden = /[\p{C}\p{Zl}\p{Zp}]/u;
const more = [
  '\u001b]0;title\u0007\u001b[31mred\u001b[2J',
  'x\n/etc/passwd:1:1: error: made up [made-up]',
  '[Run](command:workbench.action.terminal.new) $(trash) {file} {got}',
  '$(rm -rf ~) `rm -rf ~` ; rm -rf ~ && %PATH%',
  'https://example.org/ www.example.org file:///etc/passwd',
  'a\u061c\u200e\u200f\u2066b\u2069\ufeff',
];
const names = [...hostileNames, ...more];
const codes = Object.keys(sentences) as FindingCode[];

function hostileFinding(code: FindingCode, name: string, inDocument: boolean): Finding {
  const asked = [...sentences[code].says.matchAll(/\{(\w+)\}/g)].map((match) => match[1]);
  const values = Object.fromEntries(asked.map((key) => [key, name]));
  const place = { file: name, take: name, channel: name, from: 1, to: 2 };
  return finding(code, values, inDocument ? { ...place, path: ['takes', 0, name] } : place);
}

describe.each(names)('%j', (name) => {
  const all = codes.flatMap((code) => [hostileFinding(code, name, true), hostileFinding(code, name, false)]);

  it('stays on one line of a terminal, with nothing that cannot be seen, ended by the true code', () => {
    for (const found of all) {
      const line = problemLine(found, name, '{ "takes": [] }');
      expect(line, found.code).not.toMatch(hidden);
      expect(line.endsWith(` [${found.code}]`), found.code).toBe(true);
    }
  });

  it('stays one line of plain text in a view', () => {
    for (const found of all) {
      const { text, place, file, channel } = findingView(found, '{ "takes": [] }');
      expect(text + place, found.code).not.toMatch(hidden);
      // What leads to files and channels is the name itself.
      expect([file, channel]).toEqual([name, name]);
    }
  });

  it('comes back from JSON as it is', () => {
    for (const found of all) {
      const json = JSON.parse(JSON.stringify(findingJson(found)));
      expect([json.code, json.file, json.take, json.channel]).toEqual([found.code, name, name, name]);
    }
  });

  it('is text of the note: as many lines, no element, no link of its own', () => {
    const note = (listed: Finding[]) => {
      const result = sampleResult();
      result.findings = listed;
      return designNote(result, { document: 'belt.pairing.json', digest: 'a'.repeat(64) }, 'belt');
    };
    const calm = note(codes.map((code) => hostileFinding(code, 'calm', false)));
    const text = note(codes.map((code) => hostileFinding(code, name, false)));
    const lines = text.split('\n').slice(1);
    expect(calm.split('calm').length).toBeGreaterThan(codes.length);
    expect(lines.length).toBe(calm.split('\n').length - 1);
    const outsideCode = lines
      .join('\n')
      .replace(/```sh[\s\S]*?```/, '')
      .replace(/`[^`\n]*`/g, '');
    expect(outsideCode).not.toMatch(/<|\]\((?!belt\.note\/)|:\/\/|\bwww\./);
    expect(outsideCode.replaceAll('\n', '')).not.toMatch(hidden);
  });
});

it('a name of a megabyte does not make a line of a megabyte', () => {
  const name = 'x'.repeat(1_000_000);
  const found = finding('offset', { mean: 1, times: 2, rms: 1 }, { file: 'a.csv', channel: name });
  expect(problemLine(found, 'a.pairing.json', null).length).toBeLessThan(1000);
});

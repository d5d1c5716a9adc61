import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { translatedText } from '../../../core/findings/translate';
import { translatedPhrase } from '../../../core/findings/translatePhrase';
import type { FindingView, Views } from '../../../core/protocol/views';
import { type Computed, compute } from '../../../extension/worker/computation';
import { memoryHost } from '../../support/memoryHost';

// What the page shows of the sample bench, in German: no row may be left in English.

const project = join(__dirname, '../../..');
const bench = join(project, 'media/bench');
const files = Object.fromEntries(
  readdirSync(bench).map((file) => [file, new Uint8Array(readFileSync(join(bench, file)))]),
);
const german: Record<string, string> = JSON.parse(
  readFileSync(join(project, 'media/l10n/bundle.l10n.de.json'), 'utf8'),
);

/** English words that none of the names of the bench has. */
const english =
  /\b(?:the|of|is|are|and|with|by|to|that|samples?|taps|input|would|cannot|needs|bits|at most)\b/;

async function viewsOf(file: string): Promise<Partial<Views>> {
  const left: Computed = { read: null, fit: null, result: null, measured: null, quick: null, slow: false };
  const views: Partial<Views> = {};
  await compute(
    memoryHost(files),
    // Shorter filters are found faster, and say the same.
    new TextDecoder().decode(files[file]).replace(/"length": \d+/, '"length": 12'),
    { file, folder: '' },
    left,
    (part, view) => Object.assign(views, { [part]: view }),
    () => {},
  );
  return views;
}

function rowsOf({ firmware, evidence, choice, suitability, recordings }: Partial<Views>): string[] {
  const rows = [...(firmware?.format ?? []), ...(firmware?.cost ?? [])];
  return [
    ...rows.flatMap(({ label, value }) => [label, value]),
    firmware?.overflow.verdict ?? '',
    ...(firmware?.change ?? []),
    ...(evidence?.residuals ?? []).flatMap((row) => [row.test, row.expected, row.found, row.probability]),
    ...(evidence?.cautions ?? []),
    evidence?.method ?? '',
    evidence?.errorsWithheld ?? '',
    ...(evidence?.spectrum.lines ?? []).map(({ label }) => label),
    choice?.suggestion?.reason ?? '',
    suitability?.pair?.reason ?? '',
    ...(recordings?.files ?? []).map(({ format }) => format),
  ].filter((text) => text !== '');
}

describe.each(['belt', 'valve', 'tubing'])('%s', (name) => {
  it('has rows and findings in German', { timeout: 60_000 }, async () => {
    const views = await viewsOf(`${name}.pairing.json`);
    const rows = rowsOf(views);
    expect(rows.length).toBeGreaterThan(25);
    expect(rows.map((row) => translatedPhrase(row, german)).filter((row) => english.test(row))).toEqual([]);
    const findings: FindingView[] = [
      ...(views.suitability?.findings ?? []),
      ...(views.choice?.findings ?? []),
    ];
    const said = findings.map((found) => translatedText(found, german));
    expect(said.filter((text) => english.test(text))).toEqual([]);
  });
});

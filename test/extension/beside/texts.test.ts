import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { designFiles } from '../../../core/files/designFiles';
import { palettes } from '../../../core/note/pictures/palettes';
import { base64Of } from '../../../extension/beside/base64';
import { comparisonText } from '../../../extension/beside/comparisonText';
import { hoverText, longestHover } from '../../../extension/beside/hoverText';
import { english } from '../../../extension/beside/words';
import { hostileNames } from '../../support/hostileNames';
import { nodeSha256 } from '../../support/nodeSha256';
import { type SampleOptions, sampleResult } from '../../support/sampleResult';

const german = JSON.parse(readFileSync(join(__dirname, '../../../media/l10n/bundle.l10n.de.json'), 'utf8'));

const tapsOf = (options: SampleOptions = {}) =>
  new TextDecoder().decode(designFiles(sampleResult(options), nodeSha256).at(-1)!.bytes);

const options = { palette: palettes.dark, standing: 'current', link: 'command:x?%5B%5D', t: english };
const hover = (sample: SampleOptions = {}, change: Partial<typeof options> | object = {}) =>
  hoverText(tapsOf(sample), 'belt.taps.json', { ...options, ...change });

describe('the hover', () => {
  it('says what the taps file says', () => {
    const text = tapsOf();
    const { heldOut, arithmetic, cost } = JSON.parse(text);
    const said = hover();
    expect(said).toContain(`Held-out NMSE **${heldOut.nmseDb.toFixed(2)} dB**`);
    expect(said).toContain(`Quantisation loss **${arithmetic.quantisationLossDb.toFixed(2)} dB**`);
    expect(said).toContain(`16-bit taps, ${arithmetic.fractionBits} fraction bits`);
    expect(said).toContain(`${cost.macsPerSample} multiply-accumulates a sample`);
    expect(said).toContain('Made from: [`belt.pairing.json`](command:x?%5B%5D)');
    expect(said).toContain('State: current');
  });

  it('holds one picture of fixed size as base64, or none where it is not wanted', () => {
    const pictures = [
      ...hover().matchAll(
        /!\[[^\]]*\]\(data:image\/svg\+xml;base64,([A-Za-z0-9+/=]+)\|width=460,height=140\)/g,
      ),
    ];
    expect(pictures).toHaveLength(1);
    const svg = Buffer.from(pictures[0][1], 'base64').toString();
    expect(svg.startsWith('<svg ')).toBe(true);
    expect(svg).toContain(palettes.dark.ground);
    expect(hover({}, { palette: null })).not.toContain('data:');
  });

  it('stays shorter than what the editor shows, whatever the filter', () => {
    const inputs = Array.from({ length: 8 }, (_, i) => `channel number ${i}`);
    for (const sample of [{}, { length: 2048, inputs }]) {
      const said = hover(sample);
      expect(said.length).toBeLessThan(longestHover);
      expect(said).toContain('data:image');
    }
  });

  it('lets no name of a document become a link, markup or a picture', () => {
    const names = [
      ...hostileNames,
      '](command:evil) [x',
      '![x](http://x)',
      '<img src=x>',
      '`](command:evil)`',
    ];
    for (const name of names) {
      const said = hover({ title: name, documentFile: `${name}.pairing.json`, inputs: [name, 'b'] });
      const rest = said.replace(/!\[[^\]]*\]\(data:[^)]*\)/, '').replace('](command:x?%5B%5D)', '');
      // Within code nothing is markup, and no name with a backquote is set as code.
      const bare = rest.replace(/`[^`\n]*`/g, '');
      expect(bare, name).not.toMatch(/\]\(|<\w|!\[/);
    }
  });

  it('does without what a file does not state', () => {
    const file = JSON.parse(tapsOf({ heldOut: 'none', word: 'float32' }));
    file.cost = 3;
    delete file.title;
    file.write = null;
    const said = hoverText(JSON.stringify(file), 'x', { ...options, link: null });
    expect(said).toContain('Held-out NMSE **–**');
    expect(said).toContain('Attainable limit **withheld**');
    expect(said).toContain('Format: float32');
    expect(said).toContain('Cost: –');
  });
});

describe('base64', () => {
  it('is that of the UTF-8 bytes, whatever their number', () => {
    for (const text of ['', 'a', 'ab', 'abc', 'Δ²≥😀', '<svg/>\n']) {
      expect(base64Of(text)).toBe(Buffer.from(text).toString('base64'));
    }
  });
});

describe('the comparison', () => {
  const compare = (before: string, after: string, dictionary = {}) =>
    comparisonText(
      'belt.taps.json',
      { label: 'last commit', text: before },
      { label: 'written', text: after },
      palettes.light,
      english,
      dictionary,
    );

  it('says that the taps are the same', () => {
    expect(compare(tapsOf(), tapsOf())).toContain('The taps are the same.');
  });

  it('names the largest change of a tap, what else changed, and both figures', () => {
    const [before, after] = [tapsOf(), JSON.parse(tapsOf())];
    after.coefficients[1][9] += 0.25;
    after.heldOut.nmseDb = -12.34;
    after.recordings[0].sha256 = 'f'.repeat(64);
    const said = compare(before, JSON.stringify(after));
    expect(said).toMatch(/most w&#91;9&#93; of frame_z/);
    expect(said).toContain('Recordings that are others: `slow.csv`');
    const { nmseDb } = JSON.parse(before).heldOut;
    expect(said).toContain(`| Held-out NMSE | ${nmseDb.toFixed(2)} dB | -12.34 dB |`);
    const pictures = [...said.matchAll(/base64,([^)]+)\)/g)].map(([, svg]) => Buffer.from(svg, 'base64'));
    for (const [r, input] of ['frame_x', 'frame_z'].entries()) {
      expect(`${pictures[r]}`).toContain(`${input}, last commit`);
      expect(`${pictures[r]}`).toContain(`${input}, written`);
    }
  });

  it('is told in the language of the editor', () => {
    const after = JSON.parse(tapsOf());
    after.coefficients[1][9] += 0.25;
    after.heldOut.nmseDb = -12.34;
    const said = compare(tapsOf(), JSON.stringify(after), german);
    expect(said).toMatch(/Koeffizienten um .* ihrer Größe, am meisten w&#91;9&#93; von frame_z: von .* auf /);
    expect(said).toMatch(/Frequenzgang um höchstens .* dB bei .*; zurückgehalten von .* auf -12\.34 dB/);
  });

  it('refuses what is no taps file, and does not compare other numbers of inputs', () => {
    expect(() => compare('{}', tapsOf())).toThrow('not-taps');
    expect(compare(tapsOf(), tapsOf({ inputs: ['a'] }))).toContain('other numbers of inputs');
  });
});

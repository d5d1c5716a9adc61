import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { choicePicture } from '../../../core/note/pictures/choice';
import { impulsePicture } from '../../../core/note/pictures/impulse';
import { magnitudePicture } from '../../../core/note/pictures/magnitude';
import { spectraPicture } from '../../../core/note/pictures/spectra';
import type { DesignResult } from '../../../core/pipeline/designResult';
import { hostileNames } from '../../support/hostileNames';
import { needs, python } from '../../support/programs';
import { sampleChoice, sampleResult } from '../../support/sampleResult';
import { xmlFault } from '../../support/wellFormedXml';

const mark = '<!-- generated -->';

function pictures(result: DesignResult): string[] {
  const choice = choicePicture({ ...result, choice: sampleChoice() }, mark) ?? '';
  return [...[impulsePicture, magnitudePicture, spectraPicture].map((draw) => draw(result, mark)), choice];
}

/** Results that are hard to draw. */
function oddResults(): DesignResult[] {
  const silent = sampleResult();
  for (const row of silent.coefficients) row.fill(0);
  silent.spectra.desired.fill(0);
  silent.spectra.error.fill(0);
  const broken = sampleResult();
  broken.spectra.error.fill(Number.NaN);
  broken.spectra.averages = 0;
  const fast = sampleResult({ length: 5000, job: 'equalise' });
  fast.sampleRate = 50e6;
  return [
    silent,
    broken,
    fast,
    sampleResult({ length: 1, inputs: ['a'] }),
    sampleResult({ heldOut: 'none' }),
  ];
}

describe('the pictures of the note', () => {
  const all = [
    ...pictures(sampleResult()),
    ...oddResults().flatMap(pictures),
    ...hostileNames.flatMap((hostile) =>
      pictures(sampleResult({ inputs: [hostile, 'b'], desired: hostile })),
    ),
  ];

  it('are well-formed XML (own reader)', () => {
    expect(all.map(xmlFault)).toEqual(all.map(() => null));
    expect(xmlFault('<a><b></a></b>')).not.toBeNull();
    expect(xmlFault('<a>&x</a>')).not.toBeNull();
  });

  it.skipIf(!needs('scipy'))('are well-formed XML (expat, through Python)', () => {
    const script = `import json, sys, xml.dom.minidom
for text in json.load(sys.stdin): xml.dom.minidom.parseString(text.encode('utf-8'))`;
    execFileSync(python, ['-c', script], { input: JSON.stringify(all) });
  });

  it('have a role, a title, a description and an opaque light ground', () => {
    for (const svg of all) {
      expect(svg.startsWith(`${mark}\n<svg `)).toBe(true);
      expect(svg).toMatch(/role="img" aria-labelledby="title description"/);
      expect(svg).toMatch(/<title id="title">[^<]+<\/title>\n<desc id="description">[^<]+<\/desc>/);
      expect(svg).toContain('fill="#ffffff"');
    }
  });

  it('hold finite coordinates of at most two decimals', () => {
    for (const svg of all) {
      expect(svg).not.toMatch(/NaN|Infinity|undefined|-0[",]/);
      // Tick labels stand between tags and may be longer.
      expect(svg.replace(/>[^<]*</g, '><')).not.toMatch(/\d\.\d{3}/);
    }
  });

  it('name their axes with units', () => {
    const [impulse, magnitude, spectra, choice] = pictures(sampleResult());
    expect(impulse).toContain('>delay k in samples of 0.5 ms<');
    expect(magnitude).toContain('>frequency in Hz<');
    expect(magnitude).toContain('>dB re 1 (d unit / x unit)<');
    expect(spectra).toContain('>dB re 1 unit²/Hz of d<');
    expect(spectraPicture(oddResults()[2], mark)).toContain('>frequency in MHz<');
    for (const title of ['length in taps', 'delay in samples']) expect(choice).toContain(`>${title}<`);
  });

  it('tell curves apart by dash as well as by colour', () => {
    const svg = magnitudePicture(
      sampleResult({ inputs: Array.from({ length: 12 }, (_, i) => `x${i}`) }),
      mark,
    );
    const strokes = [
      ...svg.matchAll(/stroke-width="2" stroke="(#\w+)"(?: stroke-dasharray="([\d ]+)")?\/>\n<text/g),
    ];
    expect(strokes).toHaveLength(12);
    expect(new Set(strokes.map(([, colour, dash]) => `${colour} ${dash}`)).size).toBe(12);
    expect(new Set(strokes.map(([, , dash]) => dash)).size).toBe(4);
  });

  it('show the output where the job uses it, and what the spectra are of', () => {
    const of = (options: Parameters<typeof sampleResult>[0]) => spectraPicture(sampleResult(options), mark);
    expect(of({ job: 'equalise', heldOut: 'all' })).toContain('>output y<');
    expect(of({ job: 'identify', heldOut: 'all' })).not.toContain('output y');
    expect(of({})).toContain('Spectra of the held-out, disturbance-only data<');
    expect(of({ heldOut: 'all' })).toContain(
      'Spectra of the held-out data (the wanted signal hides the disturbance)<',
    );
    expect(of({ heldOut: 'none', job: 'predict' })).toContain('Spectra of the fit data<');
  });

  it('draw a stem for each tap, and long filters as a line of at most two points for each column', () => {
    const stems = impulsePicture(sampleResult({ inputs: ['a'] }), mark);
    expect(/d="((?:M[\d.]+,[\d.]+V[\d.]+)+)" fill="none"/.exec(stems)?.[1].match(/M/g)).toHaveLength(64);
    const long = impulsePicture(sampleResult({ inputs: ['a'], length: 5000 }), mark);
    const points = /d="(M[^"]*L[^"]*)"/.exec(long)?.[1].match(/[ML]/g)?.length ?? 0;
    expect(points).toBeGreaterThan(600);
    expect(points).toBeLessThanOrEqual(1240);
  });

  it('mark the value of the document, and break where there is no solution', () => {
    const svg = choicePicture({ ...sampleResult(), choice: sampleChoice() }, mark) ?? '';
    expect(
      [...svg.matchAll(/text-anchor="middle" fill="#1f2328">(64|0|0\.0001)</g)].map((m) => m[1]),
    ).toEqual(['64', '0', '0.0001']);
    // Four lengths, three delays and two regularisations that could be solved.
    expect(svg.match(/h0" stroke-width="5"/g)).toHaveLength(9);
    expect(choicePicture(sampleResult(), mark)).toBeNull();
  });

  it('put the largest magnitude where the response has it', () => {
    // Two taps of 1: 6.02 dB at 0 Hz, falling to nothing at half the rate.
    const result = sampleResult({ inputs: ['a'], length: 2 });
    result.coefficients = [Float64Array.of(1, 1)];
    const svg = magnitudePicture(result, mark);
    const d = /<path d="(M[^"]*)" fill="none" stroke-width="1.5"/.exec(svg)?.[1] ?? '';
    const heights = [...d.matchAll(/,([\d.]+)/g)].map((match) => Number(match[1]));
    expect(heights.length).toBe(621);
    expect(heights).toEqual([...heights].sort((a, b) => a - b));
  });
});

import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { benchCopy, snapshot, tapwright } from '../support/cli';

// `tapwright choose` on the sample bench, whose paths are known from how the recordings were made.

let bench: string;
beforeAll(() => {
  bench = benchCopy();
});

/** What the bench's README says of each path: taps that hold it, and the delay at which its first taps are of use. */
const known = [
  // 80 ms of ringing at 800 samples a second: 64 taps.
  { document: 'belt.pairing.json', taps: [40, 80], delays: [-1, 4] },
  // Ten samples of dead time, then a 12 Hz second-order response.
  { document: 'valve.pairing.json', taps: [96, 160], delays: [-12, 0] },
  // An equaliser of a path that rings: 96 taps about its middle.
  { document: 'tubing.pairing.json', taps: [80, 128], delays: [12, 60] },
] as const;

describe.each(known)('$document', ({ document, taps, delays }) => {
  it('suggests what is known of the path, and keeps the promise on the held-out part', () => {
    const before = snapshot(bench);
    const { status, out, err } = tapwright(bench, 'choose', document, '--json');
    expect(err).toBe('');
    expect(status).toBe(0);
    const result = JSON.parse(out);
    const { length, delay, regularisation, nmseDb, heldOutNmseDb, reason } = result.suggestion;
    expect(length).toBeGreaterThanOrEqual(taps[0]);
    expect(length).toBeLessThanOrEqual(taps[1]);
    expect(delay).toBeGreaterThanOrEqual(delays[0]);
    expect(delay).toBeLessThanOrEqual(delays[1]);
    // Known from how the recordings were made, for the document's own length and delay.
    const { idealNmseDb } = JSON.parse(readFileSync(join(bench, 'ideal.json'), 'utf8'))[document];
    expect(heldOutNmseDb).toBeLessThan(idealNmseDb + 0.3);
    expect(Math.abs(nmseDb - heldOutNmseDb)).toBeLessThan(0.5);
    // A limit that no linear filter beats but by chance.
    expect(nmseDb).toBeGreaterThan(-result.attainableDb - 0.5);
    expect([result.lengths.length, result.delays.length, result.regularisations.length]).toEqual([24, 33, 9]);
    const own = JSON.parse(readFileSync(join(bench, document), 'utf8')).filter;
    expect(result.lengths).toContain(own.length);
    expect(result.delays).toContain(own.delay);
    expect(result.regularisations).toContain(own.regularisation);
    const place = [
      result.lengths.indexOf(length),
      result.delays.indexOf(delay),
      result.regularisations.indexOf(regularisation),
    ];
    expect(result.nmseDb[place[0]][place[1]][place[2]]).toBe(nmseDb);
    expect(result.standardErrorDb[place[0]][place[1]][place[2]]).toBeGreaterThan(0);
    expect(reason).toContain(`${length} taps`);
    expect(result.findings).toEqual([]);
    expect(snapshot(bench)).toEqual(before);
  });
});

describe('tapwright choose', () => {
  it('prints curves, map and suggestion for people', () => {
    const { status, out } = tapwright(bench, 'choose', 'valve.pairing.json');
    expect(status).toBe(0);
    for (const part of ['against length', 'against delay', 'against regularisation', 'by length and delay']) {
      expect(out).toContain(part);
    }
    expect(out).toMatch(/^ +taps +MACs +cross-validated +± +fit$/m);
    expect(out).toMatch(/^ +112\* +112 +-35\.\d\d +0\.\d\d +-35\.\d\d$/m);
    expect(out).toMatch(/^Held out: -3\d\.\d\d dB over 4,\d{3} samples\.$/m);
    expect(out).toMatch(/^Attainable from the coherence: -3\d\.\d\d dB$/m);
    for (const criterion of ['AIC', 'MDL', 'GCV']) expect(out).toContain(`${criterion} would take`);
    for (const line of out.split('\n')) if (line.startsWith('  ')) expect(line.length).toBeLessThan(100);
  });

  it('is listed, explains itself, and refuses bad input with exit code 2', () => {
    expect(tapwright(bench, '--help').out).toContain('tapwright choose DOC');
    expect(tapwright(bench, 'choose', '--help').out).toContain('left out');
    expect(tapwright(bench, 'choose').status).toBe(2);
    const missing = tapwright(bench, 'choose', 'none.pairing.json', '--json');
    expect(missing.status).toBe(2);
    expect(JSON.parse(missing.out).findings[0].code).toBe('missing-document');
    const text = readFileSync(join(bench, 'valve.pairing.json'), 'utf8');
    writeFileSync(join(bench, 'short.pairing.json'), text.replace('"to": 11 }', '"to": 0.35 }'));
    const short = tapwright(bench, 'choose', 'short.pairing.json', '--json');
    expect(short.status).toBe(2);
    expect(short.err).toMatch(/^short\.pairing\.json:\d+:\d+: error: .*\[too-short-to-choose\]$/m);
    expect(JSON.parse(short.out).findings[0].code).toBe('too-short-to-choose');
  });
});

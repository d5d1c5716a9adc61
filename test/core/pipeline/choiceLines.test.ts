import { describe, expect, it } from 'vitest';
import { type Candidate, crossValidated, fitted } from '../../../core/choice/candidate';
import { newPace } from '../../../core/pace';
import { type ChoiceLines, choiceLines } from '../../../core/pipeline/choiceLines';
import { choose } from '../../../core/pipeline/choose';
import { readPairing } from '../../../core/pipeline/pairing';
import { csvOf, memoryHost } from '../../support/memoryHost';
import { normals } from '../../support/random';
import { convolve } from '../../support/takes';

// Reference: the search over every combination, whose errors are held against filtering in test/core/choice.

const samples = 3000;
const fit = 2000;
const x = normals(1, samples);
const noise = normals(3, samples);
const d = convolve(x, normals(2, 12)).map((value, n) => value + 0.2 * noise[n]);
const place = { file: 'path.pairing.json', folder: '' };

function documentOf(filter: object, to = fit): string {
  const track = (channel: string) => ({ file: 'a.csv', channel });
  const take = {
    inputs: [track('x')],
    desired: track('d'),
    fit: { from: 0, to, samples: true },
    heldOut: { from: fit, to: samples, samples: true },
  };
  return JSON.stringify({
    pairing: 1,
    title: 'Path',
    job: 'identify',
    sampleRate: 1000,
    takes: [take],
    filter,
  });
}

async function linesOf(text: string, desired = d) {
  const host = memoryHost({ 'a.csv': csvOf({ x, d: desired }) });
  const { pairing } = await readPairing(host, text, place);
  if (pairing === null) throw new Error('not read');
  return choiceLines(pairing, { ...host, pace: newPace() });
}

function known(lines: Awaited<ReturnType<typeof linesOf>>): ChoiceLines {
  if ('withheld' in lines) throw new Error(lines.withheld);
  return lines;
}

const filter = { length: 8, delay: 1, regularisation: 2e-6 };

describe('choiceLines', () => {
  it('are the candidates of the search through the filter of the document', async () => {
    const text = documentOf(filter);
    const lines = known(await linesOf(text));
    const { choice } = await choose(memoryHost({ 'a.csv': csvOf({ x, d }) }), text, place);
    if (choice === null) throw new Error('not chosen');
    const { search } = choice;
    const { grid } = search;
    const own: Candidate = {
      length: grid.lengths.indexOf(8),
      delay: grid.delays.indexOf(1),
      regularisation: grid.regularisations.indexOf(2e-6),
    };
    const lists = { length: grid.lengths, delay: grid.delays, regularisation: grid.regularisations };
    for (const what of ['length', 'delay', 'regularisation'] as const) {
      const line = lines[what];
      expect(line.values).toEqual(lists[what]);
      expect(line.own).toBe(own[what]);
      line.values.forEach((_, i) => {
        const candidate = { ...own, [what]: i };
        expect(line.crossDb[i]).toBeCloseTo(10 * Math.log10(crossValidated(search, candidate)), 9);
        expect(line.fitDb[i]).toBeCloseTo(10 * Math.log10(fitted(search, candidate)), 9);
        expect(line.errorDb[i]).toBeGreaterThan(0);
      });
    }
    expect(lines.validation.blocks).toBe(10);
  });

  it('do not see what is held out', async () => {
    // A delay of -23 takes the desired signal from up to 23 samples after each n of the fit.
    const other = d.map((value, n) => (n < fit + 23 ? value : 100 * Math.sin(n)));
    expect(await linesOf(documentOf(filter), other)).toEqual(await linesOf(documentOf(filter)));
  });

  it('say why there are none', async () => {
    expect(await linesOf(documentOf(filter, 30))).toEqual({
      withheld: expect.stringContaining('cross-validation'),
    });
  });
});

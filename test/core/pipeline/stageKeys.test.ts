import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { designFiles } from '../../../core/files/designFiles';
import { design } from '../../../core/pipeline/design';
import type { Host } from '../../../core/pipeline/host';
import { newKeep } from '../../../core/pipeline/keep';
import { memoryHost } from '../../support/memoryHost';

// Reference: the same document computed from the beginning.

const bench = join(__dirname, '../../../media/bench');
const original = JSON.parse(readFileSync(join(bench, 'valve.pairing.json'), 'utf8'));
const place = { file: 'valve.pairing.json', folder: '' };
const csv = new Uint8Array(readFileSync(join(bench, 'valve.csv')));

interface Document {
  [key: string]: unknown;
  takes: { [key: string]: unknown; name: string }[];
  filter: object;
}

const edits: [string, (document: Document) => object][] = [
  ['nothing', () => ({})],
  ['the job', () => ({ job: 'predict' })],
  ['the job once more', () => ({ job: 'equalise' })],
  ['the length', ({ filter }) => ({ filter: { ...filter, length: 20 } })],
  ['the delay', ({ filter }) => ({ filter: { ...filter, delay: 1 } })],
  ['the regularisation', ({ filter }) => ({ filter: { ...filter, regularisation: 0.01 } })],
  ['the windowing', ({ filter }) => ({ filter: { ...filter, windowing: 'autocorrelation' } })],
  ['the symmetry', ({ filter }) => ({ filter: { ...filter, symmetry: 'even' } })],
  ['a fixed gain', ({ filter }) => ({ filter: { ...filter, fixedGain: { frequency: 0, gain: 1 } } })],
  ['the means', () => ({ prepare: { removeMean: false } })],
  ['the band', () => ({ prepare: { band: { from: 20, to: 200 } } })],
  ['the word', () => ({ arithmetic: { word: 12 } })],
  ['the rounding', () => ({ arithmetic: { rounding: 'nearest' } })],
  ['the held-out interval', ({ takes }) => ({ takes: [{ ...takes[0], heldOut: { from: 8, to: 9 } }] })],
  ['no held-out interval', ({ takes }) => ({ takes: [{ ...takes[0], heldOut: [] }] })],
  ['the fit interval', ({ takes }) => ({ takes: [{ ...takes[0], fit: { from: 0, to: 5 } }] })],
  ['the name of the take', ({ takes }) => ({ takes: [{ ...takes[0], name: 'renamed' }] })],
  ['a limit', () => ({ limits: { heldOutNmse: -99 } })],
  ['the title', () => ({ title: 'Another' })],
];

async function made(host: Host, edit: (document: Document) => object) {
  const text = JSON.stringify({ ...original, ...edit(original) });
  const { result, findings } = await design(host, text, place);
  return {
    findings,
    files: result && designFiles(result, host.newSha256).map(({ path, bytes }) => [path, String(bytes)]),
  };
}

describe('kept stages', () => {
  const fresh = memoryHost({ 'valve.csv': csv });
  const kept: Host = {
    ...fresh,
    keep: newKeep(4),
    async open(path) {
      const source = await fresh.open(path);
      return typeof source === 'string' ? source : { ...source, stamp: 'as it is' };
    },
  };

  it.each(edits)('give after a change of %s what a new computation gives', async (_what, edit) => {
    // What was kept is that of the document as it stands in the bench.
    await made(kept, () => ({}));
    expect(await made(kept, edit)).toEqual(await made(fresh, edit));
  });
});

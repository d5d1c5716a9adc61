import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { design } from '../../../core/pipeline/design';
import { readPairing } from '../../../core/pipeline/pairing';
import { prepareQuick, quickFigures } from '../../../core/pipeline/quickFigures';
import { memoryHost } from '../../support/memoryHost';

// Reference: the filter itself, run over the samples by `design`.

const bench = join(__dirname, '../../../media/bench');
const read = (file: string) => readFileSync(join(bench, file));

async function setUp(name: string) {
  const document = JSON.parse(read(`${name}.pairing.json`).toString());
  const files = new Set<string>(
    document.takes.flatMap((take: { inputs: { file: string }[]; desired: { file: string } }) =>
      [...take.inputs, take.desired].map(({ file }) => file),
    ),
  );
  const host = memoryHost(Object.fromEntries([...files].map((file) => [file, new Uint8Array(read(file))])));
  const place = { file: `${name}.pairing.json`, folder: '' };
  const textOf = (filter: object) =>
    JSON.stringify({ ...document, filter: { ...document.filter, ...filter } });
  const pairingOf = async (filter: object) => (await readPairing(host, textOf(filter), place)).pairing!;
  return { host, place, textOf, pairingOf, filter: document.filter };
}

describe('quick figures', () => {
  for (const name of ['belt', 'valve', 'tubing']) {
    it(`are those of the filter run over the samples, but for a few at the ends: ${name}`, async () => {
      const { host, place, textOf, pairingOf, filter } = await setUp(name);
      const statistics = await prepareQuick(await pairingOf({}), null, host);
      const changes = [
        {},
        { delay: filter.delay - 2, regularisation: 1e-2 },
        { length: Math.ceil(filter.length / 2), delay: filter.delay + 1 },
      ];
      for (const change of changes) {
        const quick = quickFigures(await pairingOf(change), statistics)!;
        const { result } = await design(host, textOf(change), place);
        expect(Math.abs(quick.heldOutDb - result!.heldOut!.nmseDb)).toBeLessThan(0.05);
        expect(Math.abs(quick.fitDb - result!.fit.nmseDb)).toBeLessThan(0.05);
        expect(quick.heldOutSamples).toBeGreaterThan(0.98 * result!.heldOut!.samples);
      }
    });
  }

  it('are withheld where the statistics are of something else', async () => {
    const { host, pairingOf, filter } = await setUp('belt');
    const pairing = await pairingOf({});
    const statistics = await prepareQuick(pairing, null, host);
    expect(await prepareQuick(await pairingOf({ length: filter.length - 1 }), statistics, host)).toBe(
      statistics,
    );
    expect(quickFigures(await pairingOf({ length: 1000 }), statistics)).toBeNull();
    expect(quickFigures(await pairingOf({ symmetry: 'even' }), statistics)).toBeNull();
    const [take] = pairing.takes;
    const moved = {
      ...pairing,
      takes: [{ ...take, heldOut: [{ from: take.heldOut[0].from, to: 110_000 }] }],
    };
    expect(quickFigures(moved, statistics)).toBeNull();
  });
});

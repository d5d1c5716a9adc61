import type { Pace } from '../pace';
import type { Interval } from '../pair/intervals';
import { eachBlock } from '../pair/pieces';
import type { SignalReader } from '../pair/signals';
import { type BlockSpectra, blockFor, newBlockSpectra, newSpectrum, type Spectrum } from './blockSpectra';
import { emptySums, type NormalSums } from './normalSums';

/**
 * The sums over the n of one stretch, gathered block by block: for each pair of signals the spectra
 * `Z conj(X)` of current block and joined input are added up and transformed back once at the end.
 * `count` is left to the caller, since the two windowings count differently.
 * @param read gives the samples before the stretch as they are to count: the true ones or zeros
 * @param inputs K
 * @param length M
 * @param edges whether the samples at the ends are kept for shift updates
 */
export async function sumStretch(
  read: SignalReader,
  stretch: Interval,
  inputs: number,
  length: number,
  edges: boolean,
  pace: Pace,
): Promise<NormalSums> {
  const sums = emptySums(inputs, length);
  const spectra = newBlockSpectra(inputs + 1, blockFor(length));
  const products = newProducts(inputs, spectra);
  const history = (await read(stretch.from, stretch.from, length - 1)).inputs.map((samples) =>
    samples.slice(),
  );
  spectra.push(history.map((samples) => atEnd(samples, spectra.block)));

  await eachBlock(read, stretch, spectra.block, 0, ({ inputs: x, desired }, _, to) => {
    spectra.push([...x, desired]);
    addProducts(products, spectra);
    for (let k = 0; k < desired.length; k++) sums.desiredEnergy += desired[k] * desired[k];
    return pace.step('statistics', to - stretch.from, stretch.to - stretch.from);
  });
  finishProducts(products, spectra, sums);

  if (edges && length > 1) {
    const last = await read(stretch.to, stretch.to, length - 1);
    sums.edges.push({ before: history.map(reversed), after: last.inputs.map(reversed) });
  }
  return sums;
}

/** `[r][t]`: accumulated Z_t conj(X_r). */
type Products = Spectrum[][];

function newProducts(inputs: number, spectra: BlockSpectra): Products {
  return Array.from({ length: inputs }, () => spectra.packed.map(() => newSpectrum(spectra.transform.size)));
}

function addProducts(products: Products, spectra: BlockSpectra): void {
  products.forEach((row, r) => {
    row.forEach((sum, t) => {
      spectra.addProduct(t, r, sum);
    });
  });
}

function finishProducts(products: Products, spectra: BlockSpectra, sums: NormalSums): void {
  const { length, inputs } = sums;
  for (let r = 0; r < inputs; r++) {
    for (let t = 0; t < spectra.packed.length; t++) {
      const { re, im } = products[r][t];
      spectra.transform.inverse(re, im);
      for (const [signal, part] of [
        [2 * t, re],
        [2 * t + 1, im],
      ] as const) {
        if (signal < inputs) sums.correlations[r][signal].set(part.subarray(0, length));
        else if (signal === inputs) sums.cross[r].set(part.subarray(0, length));
      }
    }
  }
}

function atEnd(samples: Float64Array, block: number): Float64Array {
  const whole = new Float64Array(block);
  whole.set(samples, block - samples.length);
  return whole;
}

function reversed(samples: Float64Array): Float64Array {
  return samples.slice().reverse();
}

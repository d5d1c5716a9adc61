import type { NormalSums } from '../statistics/normalSums';
import type { DelayWalk } from './delayWalk';
import type { LengthFits } from './nestedFits';
import { outputEnergy } from './outputEnergy';
import { outputProducts } from './outputProducts';
import { type OutputTables, outputTables } from './outputTables';
import { rowProducts } from './rowProducts';

/** Delays to be passed for each candidate from which transforms of each take fewer operations. */
const mostPassed = 6;

/**
 * `wᵀ R w` of all fits of a length. Where each was found from the one before, `w' = S w + δ` with
 * `δ = Σ_j c_j g_j`, so are the energies:
 * `w'ᵀRw' = wᵀRw + (bᵀw)² - (aᵀw)² + 2 δᵀR S w + δᵀR δ`, b and a the samples at the edges. So only the few columns g are
 * transformed. Error about 1e-15 of the largest of these terms for each delay.
 * @param sums of the inputs
 */
export function fitEnergies(sums: NormalSums): (fits: LengthFits, into: Float64Array) => void {
  const tablesFor = outputTables(sums);
  const energiesOf = outputEnergy(sums, tablesFor);
  let room: Room | null = null;
  return ({ walk, taps, length }, into) => {
    if (walk === null || walk.taps.length > mostPassed * taps.length) {
      energiesOf(taps, length, into);
      return;
    }
    room ??= newRoom(walk, 2 * sums.edges.length);
    energiesOf(walk.taps.slice(0, 1), length, room.energies);
    addSteps(tablesFor(length), walk, length, room);
    for (let d = 0; d < into.length; d++) into[d] = room.energies[walk.candidates[d]];
  };
}

/** Room for what is found on the way. */
interface Room {
  /** R g of each column. */
  products: Float64Array[];
  /** `[j][i]`: `g_iᵀ R g_j`. */
  own: Float64Array[];
  /** `[step]`: of w with what it is moved on to by R g of each column, then with the samples at each edge. */
  seen: Float64Array[];
  /** `[step]` */
  energies: Float64Array;
}

function newRoom({ columns, taps }: DelayWalk, sides: number): Room {
  const grid = (rows: number, across: number) => Array.from({ length: rows }, () => new Float64Array(across));
  const count = columns.length;
  return {
    products: grid(count, columns[0].length),
    own: grid(count, count),
    seen: grid(taps.length, count + sides),
    energies: new Float64Array(taps.length),
  };
}

/** From the energy of the first step those of the others. */
function addSteps(
  tables: OutputTables,
  { columns, shares, taps }: DelayWalk,
  length: number,
  { products, own, seen, energies }: Room,
): void {
  const { inputs, edges } = tables;
  const unknowns = inputs * length;
  const count = columns.length;
  for (let j = 0; j < count; j += 2) {
    outputProducts(tables, columns.slice(j, j + 2), length, products.slice(j, j + 2));
  }
  rowProducts(columns, products, unknowns + inputs, own);
  const watched = products.map((row) => row.subarray(inputs));
  for (const { samples } of edges) watched.push(samples);
  rowProducts(watched, taps, unknowns, seen);
  for (let s = 1; s < taps.length; s++) {
    const before = seen[s - 1];
    let energy = energies[s - 1];
    for (let e = 0; e < edges.length; e++) {
      const sum = before[count + e];
      energy += edges[e].sign * sum * sum;
    }
    for (let j = 0; j < count; j++) {
      let sum = 2 * before[j];
      for (let i = 0; i < count; i++) sum += own[j][i] * shares[s][i];
      energy += shares[s][j] * sum;
    }
    energies[s] = energy;
  }
}

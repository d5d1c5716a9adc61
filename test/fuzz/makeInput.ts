import { type Dice, newDice } from './dice';
import { arrayChanges } from './mutate/array';
import { byteChanges, type Change, largestInput } from './mutate/bytes';
import { jsonChanges } from './mutate/json';
import { textChanges } from './mutate/text';
import { waveChanges } from './mutate/wave';
import { arraySeeds } from './seeds/arrays';
import { documentSeeds } from './seeds/documents';
import type { Seed } from './seeds/seed';
import { textSeeds } from './seeds/texts';
import { waveSeeds } from './seeds/waves';
import { markSeeds, tapsSeeds } from './seeds/written';

/** Who reads an input. */
export type ReaderName = 'recording' | 'document' | 'taps' | 'mark';

/** How the file behaves while it is read: it stays, becomes shorter, or other bytes come in its place. */
export type Disk = 'steady' | 'shorter' | 'other bytes';

export interface FuzzInput {
  reader: ReaderName;
  bytes: Uint8Array;
  disk: Disk;
  /** Seed and changes in words. */
  made: string;
}

interface Kind {
  reader: ReaderName;
  seeds: readonly Seed[];
  changes: readonly [string, Change<Uint8Array>][];
  /** Inputs of this kind among sixteen. */
  share: number;
  /** One change in so many knows nothing of the format. Of a text in JSON they leave little to look into. */
  bytesOnce: number;
}

/** Makes input `number` of a run, always the same. */
export type MakeInput = (number: number) => FuzzInput;

/** The inputs of a run. */
export function newMaker(seed: number): MakeInput {
  const kinds: Kind[] = [
    { reader: 'recording', seeds: waveSeeds(), changes: Object.entries(waveChanges), share: 4, bytesOnce: 5 },
    { reader: 'recording', seeds: textSeeds(), changes: Object.entries(textChanges), share: 4, bytesOnce: 5 },
    {
      reader: 'recording',
      seeds: arraySeeds(),
      changes: Object.entries(arrayChanges),
      share: 2,
      bytesOnce: 5,
    },
    {
      reader: 'document',
      seeds: documentSeeds(),
      changes: Object.entries(jsonChanges),
      share: 4,
      bytesOnce: 12,
    },
    { reader: 'taps', seeds: tapsSeeds(), changes: Object.entries(jsonChanges), share: 1, bytesOnce: 12 },
    { reader: 'mark', seeds: markSeeds(), changes: Object.entries(textChanges), share: 1, bytesOnce: 3 },
  ];
  const drawn = kinds.flatMap((kind) => new Array<Kind>(kind.share).fill(kind));
  return (number) => {
    const dice = newDice(seed, number);
    return inputOf(dice.one(drawn), kinds, dice);
  };
}

function inputOf({ reader, seeds, changes, bytesOnce }: Kind, kinds: readonly Kind[], dice: Dice): FuzzInput {
  const start = dice.one(seeds);
  const made = [start.name];
  let { bytes } = start;
  if (dice.onceIn(24)) {
    const other = dice.one(dice.one(kinds).seeds);
    made.push(`spliced with ${other.name}`);
    bytes = headedBy(bytes, other.bytes, dice);
  }
  for (let count = dice.onceIn(2) ? 1 : 1 + dice.size(5); count > 0; count--) {
    const [name, change] = dice.onceIn(bytesOnce) ? dice.one(Object.entries(byteChanges)) : dice.one(changes);
    made.push(name);
    bytes = change(bytes, dice);
    if (bytes.length > largestInput) bytes = bytes.slice(0, largestInput);
  }
  const disk = dice.onceIn(24) ? dice.one(['shorter', 'other bytes'] as const) : 'steady';
  return { reader, bytes, disk, made: made.join(', ') };
}

/** The header of one file before what follows a header in another. */
function headedBy(head: Uint8Array, body: Uint8Array, dice: Dice): Uint8Array {
  const to = Math.min(head.length, dice.one([4, 6, 8, 10, 12, 36, 44, 80, 128, 512]));
  const from = Math.min(body.length, dice.one([0, 0, 4, 12, 44, 128, 512]));
  const joined = new Uint8Array(to + body.length - from);
  joined.set(head.subarray(0, to));
  joined.set(body.subarray(from), to);
  return joined;
}

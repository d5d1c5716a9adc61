import { joined, little } from '../../support/wavBytes';
import type { Dice } from '../dice';
import { hostileSizes } from '../hostile';
import { type Change, spliced } from './bytes';

/** A chunk as it is written: what it declares need not be what it holds. */
interface Part {
  id: string;
  declared: number;
  content: Uint8Array;
}

interface Parts {
  /** The first twelve bytes. */
  head: Uint8Array;
  chunks: Part[];
}

const ids = ['fmt ', 'data', 'ds64', 'fact', 'LIST', 'JUNK', 'bext', 'id3 ', 'fmt\0', 'DATA', '\0\0\0\0'];

/** Chunks as far as they can be told; the last takes all that is left. */
function partsOf(bytes: Uint8Array): Parts {
  const chunks: Part[] = [];
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  for (let at = 12; at + 8 <= bytes.length; ) {
    const declared = view.getUint32(at + 4, true);
    const id = Buffer.from(bytes.subarray(at, at + 4)).toString('latin1');
    chunks.push({ id, declared, content: bytes.slice(at + 8, at + 8 + declared) });
    at += 8 + declared + (declared % 2);
  }
  return { head: bytes.slice(0, 12), chunks };
}

function bytesOf({ head, chunks }: Parts): Uint8Array {
  const pieces = chunks.map(({ id, declared, content }) =>
    joined(id, little(4, declared), content, content.length % 2 === 1 ? '\0' : ''),
  );
  return joined(head, ...pieces);
}

function newPart(dice: Dice): Part {
  const content = new Uint8Array(dice.size(200)).fill(dice.below(256));
  return { id: dice.one(ids), declared: content.length, content };
}

/** Numbers that a `fmt ` chunk may hold in its fields of 16 bits. */
const formatWords = [0, 1, 2, 3, 4, 6, 7, 8, 12, 16, 17, 20, 24, 32, 64, 1024, 1025, 0xfffe, 0xffff];

/** Values that samples of floats can have and nobody expects. */
const oddFloats = [Number.NaN, Number.POSITIVE_INFINITY, -3.4e38, 1e-45, 0, -0, 1.7e308];

/** A change of the list of chunks. */
function ofParts(change: (parts: Parts, dice: Dice) => void): Change<Uint8Array> {
  return (bytes, dice) => {
    const parts = partsOf(bytes);
    change(parts, dice);
    return bytesOf(parts);
  };
}

/** A change of one chunk, where there is any. */
const ofOne = (change: (part: Part, dice: Dice) => void) =>
  ofParts(({ chunks }, dice) => {
    if (chunks.length > 0) change(dice.one(chunks), dice);
  });

/** A change of the format or of the samples. */
const ofChunk = (id: string, change: (part: Part, dice: Dice) => void) =>
  ofParts(({ chunks }, dice) => {
    const part = chunks.find((chunk) => chunk.id === id);
    if (part !== undefined) change(part, dice);
  });

export const waveChanges: Record<string, Change<Uint8Array>> = {
  'drop chunk': ofParts(({ chunks }, dice) => chunks.splice(dice.below(chunks.length + 1), 1)),
  'double chunk': ofParts(({ chunks }, dice) => {
    if (chunks.length > 0) chunks.splice(dice.below(chunks.length), 0, { ...dice.one(chunks) });
  }),
  'move chunk': ofParts(({ chunks }, dice) => {
    const moved = chunks.splice(dice.below(chunks.length + 1), 1);
    chunks.splice(dice.below(chunks.length + 1), 0, ...moved);
  }),
  'new chunks': ofParts(({ chunks }, dice) => {
    const count = dice.onceIn(200) ? 12_000 : 1 + dice.size(20);
    const part = newPart(dice);
    const made = Array.from({ length: count }, (_, k) => (k === 0 || count > 100 ? part : newPart(dice)));
    const at = dice.below(chunks.length + 1);
    chunks.splice(
      at,
      0,
      ...(count > 100 ? made.map((one) => ({ ...one, declared: 0, content: new Uint8Array(0) })) : made),
    );
  }),
  'rename chunk': ofOne((part, dice) => {
    part.id = dice.one(ids);
  }),
  'chunk size': ofOne((part, dice) => {
    part.declared = dice.onceIn(2) ? dice.one(hostileSizes) : Math.max(0, part.declared + dice.below(9) - 4);
  }),
  form: (bytes, dice) =>
    spliced(bytes, 0, Math.min(4, bytes.length), joined(dice.one(['RIFF', 'RF64', 'BW64', 'RIFX', 'FFIR']))),
  'wide sizes': ofParts(({ chunks }, dice) => {
    const sizes = [dice.one(hostileSizes), dice.one(hostileSizes), dice.one(hostileSizes)];
    const content = joined(little(8, ...sizes), little(4, dice.one(hostileSizes)));
    chunks.unshift({ id: 'ds64', declared: content.length, content });
    const data = chunks.find(({ id }) => id === 'data');
    if (data !== undefined && dice.onceIn(2)) data.declared = 0xffffffff;
  }),
  'format field': ofChunk('fmt ', (part, dice) => {
    const field = dice.one([0, 2, 4, 4, 8, 12, 14, 16, 18, 24]);
    const put =
      field === 4 || field === 8 ? little(4, dice.one(hostileSizes)) : little(2, dice.one(formatWords));
    part.content = spliced(
      part.content,
      Math.min(field, part.content.length),
      Math.min(field + put.length, part.content.length),
      put,
    );
  }),
  'other format': ofChunk('fmt ', (part, dice) => {
    const [tag, bits] = dice.one([
      [1, 8],
      [1, 16],
      [1, 24],
      [1, 32],
      [3, 32],
      [3, 64],
      [6, 8],
      [7, 8],
      [1, 20],
    ]);
    const channels = dice.onceIn(20) ? 1024 : dice.one([1, 2, 3, 5, 64]);
    const rate = dice.onceIn(3) ? dice.one(hostileSizes) : dice.one([1, 50, 8000, 44100, 192000]);
    const frame = channels * Math.ceil(bits / 8);
    part.content = joined(little(2, tag, channels), little(4, rate, rate * frame), little(2, frame, bits));
    part.declared = part.content.length;
  }),
  samples: ofChunk('data', (part, dice) => {
    const [at, width] = [dice.below(part.content.length + 1), dice.one([4, 8])];
    const odd = dice.one(oddFloats);
    const value = width === 4 ? Float32Array.of(odd) : Float64Array.of(odd);
    const put = new Uint8Array(value.buffer);
    const place = Math.min(at - (at % width), Math.max(0, part.content.length - width));
    part.content = spliced(part.content, place, Math.min(part.content.length, place + width), put);
  }),
  constant: ofChunk('data', (part, dice) => {
    part.content = part.content
      .slice()
      .fill(dice.one([0, 1, 127, 128, 255]), dice.below(part.content.length + 1));
  }),
};

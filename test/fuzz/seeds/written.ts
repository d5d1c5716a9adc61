import { designFiles } from '../../../core/files/designFiles';
import { markLine } from '../../../core/files/generatedMark';
import { hostileNames } from '../../support/hostileNames';
import { nodeSha256 } from '../../support/nodeSha256';
import { type SampleOptions, sampleResult } from '../../support/sampleResult';
import { type Seed, textSeed } from './seed';

/** A file's first kilobytes hold all that a mark needs. */
const most = 4096;

const variants: SampleOptions[] = [
  { length: 6, vectors: 4, languages: ['c', 'c-source', 'rs', 'csv', 'npy'] },
  { length: 3, inputs: ['p'], word: 'float32', vectors: 0, heldOut: 'none' },
  { length: 4, word: 12, job: 'identify', delay: 2, heldOut: 'all', documentFile: 'ö"\\ x.pairing.json' },
];

/** What a design writes. */
function written() {
  return variants.flatMap((options) => designFiles(sampleResult(options), nodeSha256));
}

/** Every `NAME.taps.json` of some designs. */
export function tapsSeeds(): Seed[] {
  return written()
    .filter(({ path }) => path.endsWith('.taps.json'))
    .map(({ path, bytes }) => ({ name: path, bytes }));
}

/** The start of every written file, and marks of documents with hostile names. */
export function markSeeds(): Seed[] {
  const digest = '0123456789abcdef'.repeat(4);
  const files = written().map(({ path, bytes }) => ({ name: path, bytes: bytes.slice(0, most) }));
  const marks = hostileNames.map((document) => textSeed(document, markLine({ document, digest }, 'c')));
  return [...files, ...marks];
}

import type { RecordingHead } from '../../core/protocol/messages';
import { nameOf, stemOf } from '../files/relativePath';

/** A channel that could be the desired signal. */
export interface Candidate {
  path: string;
  channel: string | number;
}

/**
 * Channels that could be the desired one of an input, the likeliest first: the other channels of the same file; then
 * files of the same stem, rate and length; then of the same rate and length; then all others. Files that cannot be used
 * and the input's own channels are left out, the latter stand at the end for those who predict a signal from itself.
 * @param inputs channels chosen as inputs, as a document names them
 */
export function candidates(
  input: RecordingHead,
  inputs: readonly (string | number)[],
  heads: readonly RecordingHead[],
): Candidate[] {
  const rank = (head: RecordingHead): number => {
    if (head.path === input.path) return 0;
    const sameShape = head.sampleRate === input.sampleRate && head.samples === input.samples;
    const sameStem = commonStart(stemOf(head.path), stemOf(input.path));
    if (sameShape) return sameStem ? 1 : 2;
    return sameStem ? 3 : 4;
  };
  const usable = heads.filter(({ problems }) => problems.length === 0);
  const files = [input, ...usable.filter(({ path }) => path !== input.path)];
  const all = files
    .map((head, place) => ({ head, rank: rank(head), place }))
    .sort((a, b) => a.rank - b.rank || a.place - b.place)
    .flatMap(({ head }) => head.channels.map((channel) => ({ path: head.path, channel })));
  const isInput = ({ path, channel }: Candidate) => path === input.path && inputs.includes(channel);
  return [...all.filter((one) => !isInput(one)), ...all.filter(isInput)];
}

/** Paths to look into first where there are too many: of the same folder and a like name before others. */
export function nearestFirst(path: string, others: readonly string[]): string[] {
  const folder = path.slice(0, path.length - nameOf(path).length);
  const far = (other: string): number => {
    const sameFolder = other.slice(0, other.length - nameOf(other).length) === folder;
    return (sameFolder ? 0 : 2) + (commonStart(stemOf(other), stemOf(path)) ? 0 : 1);
  };
  return others
    .filter((other) => other !== path)
    .map((other, place) => ({ other, far: far(other), place }))
    .sort((a, b) => a.far - b.far || a.place - b.place)
    .map(({ other }) => other);
}

/** The same stem up to what tells the two apart at the end: `belt_in` and `belt_out`, `belt` and `belt-ref`. */
function commonStart(a: string, b: string): boolean {
  const start = (stem: string) => stem.toLowerCase().split(/[-_ .]/)[0];
  return start(a) === start(b);
}

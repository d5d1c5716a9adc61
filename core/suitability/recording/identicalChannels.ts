import { finding } from '../../findings/finding';
import type { RecordingCheck } from './check';

/**
 * Channels that hold the same samples throughout, constant ones aside. Channels are parted into classes of equal ones block
 * by block, so that different channels are compared up to their first different sample alone.
 */
export function newIdenticalChannels(count: number): RecordingCheck {
  let classes = [Array.from({ length: count }, (_, c) => c)];
  return {
    add(channels) {
      classes = classes.flatMap((members) => part(members, channels));
    },
    findings(facts) {
      return classes
        .filter(([first]) => facts[first].levels.min < facts[first].levels.max)
        .flatMap(([first, ...others]) =>
          others.map((other) =>
            finding('identical-channels', { other: facts[first].place.channel ?? '' }, facts[other].place),
          ),
        );
    },
  };
}

/** Classes of one member are left out: they can get no other. */
function part(members: readonly number[], channels: readonly Float64Array[]): number[][] {
  const classes: number[][] = [];
  for (const member of members) {
    const own = classes.find(([first]) => same(channels[first], channels[member]));
    if (own === undefined) classes.push([member]);
    else own.push(member);
  }
  return classes.filter(({ length }) => length > 1);
}

function same(a: Float64Array, b: Float64Array): boolean {
  for (let k = 0; k < a.length; k++) {
    // Two that are NaN are the same.
    if (a[k] !== b[k] && !(Number.isNaN(a[k]) && Number.isNaN(b[k]))) return false;
  }
  return true;
}

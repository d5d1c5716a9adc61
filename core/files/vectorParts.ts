import type { PartPlace } from '../numbers/testVectors';

/** The name of a part in macros and constants. */
export function partName({ part, input }: PartPlace): string {
  return input === null ? part.toUpperCase() : `${part.toUpperCase()}_${input}`;
}

/** What a part holds, for the comment above the vectors. */
export function partInWords({ part, input, from, to }: PartPlace): string {
  const place = `${from} to ${to - 1}`;
  switch (part) {
    case 'silence':
      return `${place}: silence`;
    case 'impulse':
      return `${place}: one sample at the largest value in input ${input}, then silence`;
    case 'excerpt':
      return `${place}: from the recording`;
    case 'highest':
      return `${place}: at the last sample the accumulator reaches its highest value`;
    case 'lowest':
      return `${place}: at the last sample the accumulator reaches its lowest value`;
  }
}

import { spliced } from './mutate/bytes';

/** Attempts at most; each may take as long as the input itself. */
const mostAttempts = 800;

/**
 * A smaller input that still fails: takes out halves, quarters and so on while the failure stays.
 * @param fails whether bytes still fail in the same way
 */
export async function shrink(
  bytes: Uint8Array,
  fails: (bytes: Uint8Array) => Promise<boolean>,
  most = mostAttempts,
): Promise<Uint8Array> {
  let smallest = bytes;
  let attempts = 0;
  for (let size = bytes.length >> 1; size >= 1; size >>= 1) {
    for (let end = smallest.length; end > 0 && attempts < most; end -= size, attempts++) {
      const less = spliced(
        smallest,
        Math.max(0, end - size),
        Math.min(end, smallest.length),
        new Uint8Array(0),
      );
      if (await fails(less)) smallest = less;
    }
  }
  return smallest;
}

/** A failure without its numbers and quotes, by which it is known again. */
export function alike(fault: string): string {
  return fault
    .split('\n')[0]
    .replace(/\d+(\.\d+)?(e[+-]?\d+)?/g, 'N')
    .replace(/".*"/g, 'Q');
}

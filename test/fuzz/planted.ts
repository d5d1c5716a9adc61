/** Faults put in on purpose, to see that a run finds them. */
export type Planted = 'throws' | 'hangs' | 'holds memory' | 'runs out of memory';

const held: unknown[] = [];

export const planted: Record<Planted, () => void> = {
  throws() {
    throw new TypeError('planted');
  },
  hangs() {
    for (;;);
  },
  'holds memory'() {
    held.push(Buffer.alloc(256 * 1024 * 1024, 1));
  },
  'runs out of memory'() {
    for (;;) held.push(new Array(12_000_000).fill(held.length));
  },
};

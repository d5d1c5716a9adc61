import { describe, expect, it } from 'vitest';
import { newMaker } from './makeInput';
import { largestInput } from './mutate/bytes';
import { tryInput } from './tryInput';
import { watch } from './watched';

describe('an input', () => {
  it('is the same for the same seed and number, whatever was made before', () => {
    const [one, other] = [newMaker(7), newMaker(7)];
    for (let number = 0; number < 40; number++) one(number);
    for (const number of [300, 11, 12]) expect(one(number)).toEqual(other(number));
    expect(newMaker(8)(11)).not.toEqual(one(11));
  });

  it('is of a size that the limits of memory and time are meant for', () => {
    const make = newMaker(1);
    const sizes = Array.from({ length: 600 }, (_, number) => make(number).bytes.length).sort((a, b) => a - b);
    expect(sizes.at(-1)).toBeLessThanOrEqual(largestInput);
    expect(sizes[300]).toBeGreaterThan(200);
    expect(sizes[300]).toBeLessThan(20_000);
  });
});

describe('a watched file', () => {
  it('does not give bytes that no file could have', async () => {
    const { source, work } = watch(Uint8Array.of(1, 2, 3), 'steady');
    await expect(source.read(1, 3)).rejects.toThrow('read of 3 bytes at 1 of a file of 3');
    await expect(source.read(-1, 1)).rejects.toThrow('read of 1 bytes at -1');
    await expect(source.read(0.5, 1)).rejects.toThrow('read at 0.5');
    await expect(source.read(Number.NaN, 1)).rejects.toThrow('at NaN');
    const lent = await source.read(0, 2);
    expect([...lent]).toEqual([1, 2]);
    await source.read(0, 1);
    expect([...lent], 'spoiled by the next read').toEqual([57, 57]);
    expect(work).toEqual({ bytesRead: 3, reads: 2, steps: 0 });
  });

  it('that becomes shorter while it is read is refused as changed', async () => {
    const bytes = new Uint8Array(0);
    const rows = new TextEncoder().encode('a,b\n'.concat('1,2\n'.repeat(2000)));
    expect(await tryInput({ reader: 'recording', bytes: rows, disk: 'shorter', made: 'rows' })).toContain(
      'file-changed',
    );
    expect(await tryInput({ reader: 'recording', bytes, disk: 'shorter', made: 'nothing' })).toEqual([
      'empty-file',
    ]);
  });
});

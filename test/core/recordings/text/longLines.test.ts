import { describe, expect, it } from 'vitest';
import { openBytes, readText } from '../../../support/textBytes';

// The contract is a line of 1 MiB at most; everything longer is refused, wherever in the file it is.

const limit = 1 << 20;

describe('long lines', () => {
  it('refuses a line without an end', async () => {
    for (const start of ['', '1,2\n3,4\n']) {
      const { recording, findings } = await openBytes(`${start}${'1,'.repeat(2 * limit)}`);
      expect(recording).toBeNull();
      expect(findings[0].severity).toBe('blocker');
    }
  });

  it('names the limit', async () => {
    const { findings } = await openBytes(`1,2\n3,4\n# ${'x'.repeat(3 * limit)}\n5,6\n`);
    expect(findings).toMatchObject([{ code: 'line-too-long', severity: 'blocker', values: { limit } }]);
  });

  it('reads a line of the limit, wherever it stands', async () => {
    for (const before of [4, 1000, limit / 2, limit - 10]) {
      const rows = '1,2\n'.repeat(before / 4);
      const { recording } = await readText(`${rows}#${'x'.repeat(limit - 1)}\n3,4\n5,6\n`);
      expect(recording.samples).toBe(Math.floor(before / 4) + 2);
    }
  });

  it('refuses a line beyond the limit, wherever it stands', async () => {
    for (const before of [4, 1000, limit / 2, limit - 8]) {
      const rows = '1,2\n'.repeat(before / 4);
      const { findings } = await openBytes(`${rows}#${'x'.repeat(limit + 1000)}\n1,2\n1,2\n`);
      expect(findings.map(({ code }) => code)).toEqual(['line-too-long']);
    }
  });

  it('reads again whatever it has opened', async () => {
    // Rows of 8 bytes. The block of the 4,097th row starts at 32,768, so that a chunk ends 8 bytes into the comment where
    // rows are read again from there, but not where the file is read from its start.
    const before = (32768 + limit - 8) / 8;
    const text = `${'1.5,2.5\n'.repeat(before)}#${'x'.repeat(limit + 100)}\n${'3.5,2.5\n'.repeat(4)}`;
    const { recording, findings } = await openBytes(text, 0);
    if (recording === null) expect(findings[0].code).toBe('line-too-long');
    else {
      const [plane] = await recording.read([0], 4096, before + 4);
      expect([...plane.subarray(-5)]).toEqual([1.5, 3.5, 3.5, 3.5, 3.5]);
    }
  });
});

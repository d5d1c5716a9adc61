import { describe, expect, it } from 'vitest';
import { openBytes, readText } from '../../../support/textBytes';

// First columns that are no named time. Names of running numbers are common practice.

describe('an index column', () => {
  const counted = (from: number, by = 1) =>
    [3, 1, 4, 1, 5].map((value, n) => `${from + n * by},${value}`).join('\n');

  it.each(['Sample', 'sample no', 'index', 'idx', 'n', 'No', 'row'])('named %s', async (name) => {
    for (const from of [0, 1, 1000]) {
      const { recording, values, codes } = await readText(`${name},a\n${counted(from)}\n`);
      expect(recording).toMatchObject({ channels: ['a'], sampleRate: null });
      expect(values).toEqual([[3, 1, 4, 1, 5]]);
      expect(codes).toEqual([]);
    }
  });

  it.each(['', ',a\n'])('without a name, header "%s"', async (header) => {
    for (const from of [0, 1]) {
      const { recording, values, codes } = await readText(`${header}${counted(from)}\n`);
      expect(recording.sampleRate).toBeNull();
      expect(values).toEqual([[3, 1, 4, 1, 5]]);
      expect(codes).toEqual([]);
    }
  });

  it('stays a channel where it does not count by one', async () => {
    const { recording } = await readText(`n,a\n${counted(0, 2)}\n`);
    expect(recording.channels).toEqual(['n', 'a']);
  });
});

describe('an even first column', () => {
  const ramp = Array.from({ length: 50 }, (_, n) => `${(0.5 + n * 0.25).toFixed(2)},${(n * 7) % 5}`).join(
    '\n',
  );

  it.each(['', ',a\n'])(
    'is taken as time where it has no name, which is said (header "%s")',
    async (header) => {
      const { recording, findings } = await openBytes(`${header}${ramp}\n`);
      expect(recording).toMatchObject({ sampleRate: 4, samples: 50, channels: [header === '' ? null : 'a'] });
      expect(findings).toMatchObject([{ code: 'taken-as-time', severity: 'note', values: { rate: 4 } }]);
    },
  );

  it.each(['level', 'Temperature [°C]', 'v/ms', 'tank', 'x'])('stays a channel named %s', async (name) => {
    const { recording, values, codes } = await readText(`${name},a\n${ramp}\n`);
    expect(recording).toMatchObject({ channels: [name, 'a'], sampleRate: null });
    expect(values[0][49]).toBe(12.75);
    expect(codes).toEqual([]);
  });

  it('is a signal where it falls, stands still or bends', async () => {
    for (const bend of [(n: number) => -n, () => 3, (n: number) => n * n * 0.01, (n: number) => n % 7]) {
      const text = Array.from({ length: 50 }, (_, n) => `${bend(n).toFixed(3)},${(n * 7) % 5}\n`).join('');
      const { recording, codes } = await readText(text);
      expect(recording.channels).toEqual([null, null]);
      expect(codes).toEqual([]);
    }
  });

  it('is a signal where it rises unevenly from 0', async () => {
    const text = Array.from(
      { length: 50 },
      (_, n) => `${n === 0 ? 0 : (n * 0.1 + ((n * 7) % 5) * 0.004).toFixed(3)},1\n`,
    );
    const { recording, codes } = await readText(text.join(''));
    expect(codes).toEqual([]);
    expect(recording.channels).toEqual([null, null]);
  });
});

import { describe, expect, it } from 'vitest';
import { openBytes, readText } from '../../../support/textBytes';

// Dates and times of ISO 8601 and RFC 3339. The platform's own Date prints them, independently of the reader.

/** Rows from a moment on, times printed by `print` from a Date and whole nanoseconds of the second. */
function rows(
  start: string,
  rate: number,
  count: number,
  print: (iso: string, nanoseconds: string) => string,
) {
  return Array.from({ length: count }, (_, n) => {
    const after = Math.round((n * 1e9) / rate);
    const iso = new Date(Date.parse(start) + 1000 * Math.floor(after / 1e9)).toISOString().slice(0, 19);
    return `${print(iso, String(after % 1e9).padStart(9, '0'))},${(n * 7) % 5}\n`;
  }).join('');
}

const forms: [string, (iso: string, nanoseconds: string) => string][] = [
  ['T and nanoseconds', (iso, ns) => `${iso}.${ns}`],
  ['a blank and microseconds', (iso, ns) => `${iso.replace('T', ' ')}.${ns.slice(0, 6)}`],
  ['Z', (iso, ns) => `${iso}.${ns.slice(0, 6)}Z`],
  ['a zone', (iso, ns) => `${iso}.${ns.slice(0, 6)}+05:30`],
  ['a zone without a colon, west', (iso, ns) => `${iso}.${ns.slice(0, 6)}-0800`],
  ['quotes', (iso, ns) => `"${iso}.${ns.slice(0, 6)}"`],
];

describe('dates and times', () => {
  const nights = [
    '2023-12-31T23:59:59Z',
    '2024-02-28T23:59:59Z',
    '2023-02-28T23:59:59Z',
    '1999-12-31T23:59:59Z',
    '1969-12-31T23:59:59Z',
    '2100-02-28T23:59:59Z',
    '2100-12-31T23:59:59Z',
    '2000-12-31T23:59:59Z',
  ];

  it.each(forms)('across midnights, with %s', async (_, print) => {
    for (const night of nights) {
      for (const header of ['Time,a\n', 'when,a\n', '']) {
        const { recording, codes } = await readText(header + rows(night, 1000, 3000, print));
        expect(recording).toMatchObject({ sampleRate: 1000, samples: 3000 });
        expect(recording.channels).toEqual([header === '' ? null : 'a']);
        expect(codes).toEqual([]);
      }
    }
  });

  it('keeps all nine digits of the fraction at 44,100 Hz', async () => {
    const text = rows('2024-05-05T10:00:00Z', 44100, 60_000, (iso, ns) => `${iso}.${ns}`);
    const { recording, codes } = await readText(text);
    // 1 ns over 1.36 s.
    expect(Math.abs(44100 / recording.sampleRate! - 1)).toBeLessThanOrEqual(1e-9 / (59_999 / 44100) + 1e-12);
    expect(codes).toEqual([]);
  });

  it('reads the decimal comma and semicolons', async () => {
    const text = rows('2024-05-05T10:00:00Z', 50, 200, (iso, ns) => `${iso},${ns.slice(0, 3)}`);
    const { recording } = await readText(`t;a\n${text.replace(/,(\d)\n/g, ';$1,5\n')}`);
    expect(recording).toMatchObject({ sampleRate: 50, channels: ['a'] });
  });

  it('takes the zone off where it changes', async () => {
    const times = [
      '2024-03-31T01:59:59.5+01:00',
      '2024-03-31T03:00:00.0+02:00',
      '2024-03-31T01:00:00.5Z',
      '2024-03-30T20:00:01.0-0500',
      '2024-03-30T21:30:01.5-03:30',
    ];
    const text = `t,a\n${times.map((time, n) => `${time},${n % 2}\n`).join('')}`;
    const { recording, codes } = await readText(text);
    expect(recording.sampleRate).toBe(2);
    expect(codes).toEqual([]);
  });

  it('reads whole seconds and times without seconds', async () => {
    const plain = rows('2024-05-05T10:00:00Z', 1, 90, (iso) => iso);
    expect((await readText(plain)).recording.sampleRate).toBe(1);
    const { recording } = await readText('t,a\n2024-05-05 10:59,1\n2024-05-05 11:00,2\n2024-05-05 11:01,1\n');
    expect(recording.sampleRate).toBeCloseTo(1 / 60, 4);
  });

  it('reads fractions that are left out where they are zero, as Python prints them', async () => {
    const text = rows('2024-05-05T10:00:00Z', 128, 1000, (iso, ns) =>
      ns === '000000000' ? iso : `${iso}.${ns.slice(0, 6)}`,
    );
    const { recording } = await readText(text);
    // 1 µs over 7.8 s.
    expect(Math.abs(128 / recording.sampleRate! - 1)).toBeLessThanOrEqual(1e-6 / (999 / 128));
  });

  it.each([
    '2024-02-30T00:00:00.2',
    '2023-02-29T00:00:00.2',
    '2100-02-29T00:00:00.2',
    '2024-13-01T00:00:00.2',
    '2024-00-10T00:00:00.2',
    '2024-01-01T25:00:00.2',
    '2024-01-01T24:30:00.2',
    '2024-01-01T00:60:00.2',
    'yesterday',
    '2024-01-01',
    '0.2',
  ])('refuses %s among them', async (wrong) => {
    const text = `t,a\n2024-01-01T00:00:00.0,1\n2024-01-01T00:00:00.1,2\n${wrong},3\n`;
    const { recording, findings } = await openBytes(text);
    expect(recording).toBeNull();
    expect(findings).toMatchObject([
      { code: 'not-a-number-cell', severity: 'blocker', line: 4, values: { column: 1, cell: wrong } },
    ]);
  });
});

import { describe, expect, it } from 'vitest';
import { readText } from '../../../support/textBytes';

// Names and units are common practice of loggers and oscilloscopes, dates and times are ISO 8601 and RFC 3339.

/** Rows of 1 kHz: times in a unit of so many a second, and a signal that is no ramp. */
function rows(perSecond: number, separator = ',', count = 20): string {
  return Array.from({ length: count }, (_, n) => `${(n * perSecond) / 1000}${separator}${(n * 7) % 5}`).join(
    '\n',
  );
}

const seconds = [
  'time',
  'Time',
  'TIME',
  't',
  'T',
  'Time [s]',
  'time (s)',
  'time/s',
  't/s',
  't_s',
  'time_s',
  'Zeit',
  'Zeit [s]',
  'seconds',
  's',
  'sec',
  'Elapsed time [s]',
  'time_sec',
  'time_seconds',
  'Time(sec)',
  'timestamp',
  'Temps (s)',
];
const milliseconds = [
  'Time [ms]',
  'time (ms)',
  'time/ms',
  't/ms',
  't [ms]',
  'time_ms',
  'time ms',
  'timestamp_ms',
  'ms',
  'Time (milliseconds)',
  'millis',
  'time_msec',
];
const microseconds = [
  'time_us',
  'Time [us]',
  'Time [µs]',
  'Time [μs]',
  't/µs',
  'timestamp_us',
  'us',
  'time_usec',
];

describe('a column named as time', () => {
  it.each([
    ...seconds.map((name) => [name, 1] as const),
    ...milliseconds.map((name) => [name, 1e3] as const),
    ...microseconds.map((name) => [name, 1e6] as const),
    ['time_ns', 1e9] as const,
  ])('%s: %d a second', async (name, perSecond) => {
    const { recording, codes } = await readText(`${name},a\n${rows(perSecond)}\n`);
    expect(recording.channels).toEqual(['a']);
    expect(recording.sampleRate).toBe(1000);
    expect(codes).toEqual([]);
  });

  it('reads minutes', async () => {
    const text = Array.from({ length: 20 }, (_, n) => `${(n * 0.001).toFixed(6)},${(n * 7) % 5}\n`).join('');
    const { recording } = await readText(`Time [min],a\n${text}`);
    expect(Math.abs(1000 / 60 / recording.sampleRate! - 1)).toBeLessThanOrEqual(1e-6 / 0.019);
  });

  it.each([
    ['s', 1],
    ['[s]', 1],
    ['ms', 1e3],
    ['(ms)', 1e3],
    ['[us]', 1e6],
    ['µs', 1e6],
  ] as const)('with %s in the units row', async (unit, perSecond) => {
    for (const separator of [',', ';', '\t', ' ']) {
      const text = `time${separator}a\n${unit}${separator}V\n${rows(perSecond, separator)}\n`;
      const { recording, codes } = await readText(text);
      expect(recording).toMatchObject({ channels: ['a'], sampleRate: 1000, samples: 20 });
      expect(codes).toEqual([]);
    }
  });

  it('takes the time for no channel, however channels are asked for', async () => {
    const { recording } = await readText('t,a,b\n0.00,1,5\n0.01,2,4\n0.02,1,6\n');
    expect(await recording.read([1, 0], 1, 3)).toEqual([Float64Array.of(4, 6), Float64Array.of(2, 1)]);
    expect(recording.sampleRate).toBe(100);
  });

  it('reads times with the decimal comma', async () => {
    const { recording } = await readText('t;a\n0,000;1,5\n0,001;2,5\n0,002;1,5\n');
    expect(recording).toMatchObject({ channels: ['a'], sampleRate: 1000 });
  });

  it('is a signal where it is the only column', async () => {
    const { recording, values } = await readText('time\n0.00\n0.01\n0.02\n');
    expect(recording).toMatchObject({ channels: ['time'], sampleRate: null });
    expect(values).toEqual([[0, 0.01, 0.02]]);
  });
});

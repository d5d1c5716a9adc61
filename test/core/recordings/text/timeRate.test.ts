import { describe, expect, it } from 'vitest';
import { readText } from '../../../support/textBytes';

// Expected by own reasoning: a time printed to a resolution r is off by at most r/2, so that the span from the first to
// the last is off by at most r, and the period by at most the part r / span of itself. No reader can promise less, and
// none needs more. Doubles add 1e-12 or so.

const rates: [string, number][] = [
  ['1000/3 Hz', 1000 / 3],
  ['44,100 Hz', 44100],
  ['48,000 Hz', 48000],
];

/** A text of `seconds` seconds; the signal is no ramp and has no name that could be taken for a time. */
function textOf(rate: number, seconds: number, header: string, print: (time: number) => string, from = 0) {
  const rows = Math.round(rate * seconds);
  const lines = Array.from({ length: rows }, (_, n) => `${print(from + n / rate)},${(n * 7) % 5}`);
  return { text: `${header}${lines.join('\n')}\n`, span: (rows - 1) / rate };
}

async function expectRate(text: string, rate: number, allowed: number): Promise<void> {
  const { recording, codes } = await readText(text);
  expect(codes.filter((code) => code !== 'taken-as-time')).toEqual([]);
  expect(recording.channels.length).toBe(1);
  expect(Math.abs(rate / recording.sampleRate! - 1)).toBeLessThanOrEqual(allowed + 1e-12);
}

describe.each(rates)('times of %s', (_, rate) => {
  it.each([4, 5, 6, 7, 8, 9])('printed with %d decimals', async (digits) => {
    const { text, span } = textOf(rate, 2.5, 'time,a\n', (time) => time.toFixed(digits));
    await expectRate(text, rate, 10 ** -digits / span);
  });

  it.each([4, 6, 9])('printed with %d decimals, starting at 1234.5 s', async (digits) => {
    const { text, span } = textOf(rate, 2.5, 'time,a\n', (time) => time.toFixed(digits), 1234.5);
    await expectRate(text, rate, 10 ** -digits / span);
  });

  it('printed by the shortest digits that give the double back, as many programs do', async () => {
    const { text } = textOf(rate, 2.5, 'time,a\n', String);
    await expectRate(text, rate, 1e-10);
  });

  it('printed by the shortest digits, "0.0" first, as Python does', async () => {
    const { text } = textOf(rate, 2.5, 'time,a\n', (time) => (time === 0 ? '0.0' : String(time)));
    await expectRate(text, rate, 1e-10);
  });

  it('printed with 8 significant digits, as C prints %.8g', async () => {
    const { text, span } = textOf(rate, 12, 'time,a\n', (time) => String(Number(time.toPrecision(8))));
    // Times from 10 s on have 6 decimals.
    await expectRate(text, rate, 1e-6 / span);
  });

  it('printed with 7 significant digits and an exponent, as C prints %.6e', async () => {
    const { text, span } = textOf(rate, 12, 'time,a\n', (time) => time.toExponential(6));
    // From 10 s on the last digit stands for 10 µs, half a sample at 48,000 Hz.
    await expectRate(text, rate, 1e-5 / span);
  });

  it('printed with 19 significant digits and an exponent, as NumPy does when nothing is said', async () => {
    const { text } = textOf(rate, 2.5, 'time,a\n', (time) => time.toExponential(18));
    await expectRate(text, rate, 1e-10);
  });

  it('printed with 19 significant digits without a name', async () => {
    const { text } = textOf(rate, 2.5, '', (time) => time.toExponential(18));
    await expectRate(text, rate, 1e-10);
  });

  it('printed with 6 decimals without a name', async () => {
    const { text, span } = textOf(rate, 2.5, '', (time) => time.toFixed(6));
    await expectRate(text, rate, 1e-6 / span);
  });
});

describe('times since 1970', () => {
  const start = 1_700_000_000n * 1_000_000_000n;
  const rows = (rate: bigint, print: (nanoseconds: bigint) => string) =>
    Array.from({ length: 100_000 }, (_, n) => {
      const after = (BigInt(n) * 1_000_000_000n + rate / 2n) / rate;
      return `${print(start + after)},${(n * 7) % 5}`;
    }).join('\n');
  const span = 99_999 / 48000;

  it('in whole microseconds', async () => {
    const text = `time_us,a\n${rows(48000n, (t) => String(t / 1000n))}\n`;
    await expectRate(text, 48000, 1e-6 / span);
  });

  it('in seconds with 6 decimals', async () => {
    const text = `time,a\n${rows(48000n, (t) => `${t / 1_000_000_000n}.${String((t % 1_000_000_000n) / 1000n).padStart(6, '0')}`)}\n`;
    await expectRate(text, 48000, 1e-6 / span);
  });

  // A double holds such times to 256 ns only, which is then the resolution that a reader may be held to.
  it('in whole nanoseconds', async () => {
    const text = `time_ns,a\n${rows(48000n, String)}\n`;
    await expectRate(text, 48000, 256e-9 / span);
  });

  it('in seconds with 9 decimals', async () => {
    const text = `time,a\n${rows(48000n, (t) => `${t / 1_000_000_000n}.${String(t % 1_000_000_000n).padStart(9, '0')}`)}\n`;
    await expectRate(text, 48000, 256e-9 / span);
  });
});

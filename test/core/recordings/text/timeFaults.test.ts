import { describe, expect, it } from 'vitest';
import { sayWithPlace } from '../../../../core/findings/say';
import { openBytes, timedText } from '../../../support/textBytes';

// Expectations by own reasoning: what is done to the even times of 1 kHz is what must be found, at that sample.

async function expectBlocker(text: string, words: RegExp, from: number): Promise<void> {
  const { recording, findings } = await openBytes(text);
  expect(recording).toBeNull();
  expect(findings).toMatchObject([
    { code: 'uneven-time', severity: 'blocker', file: 'x.csv', from, to: from + 1 },
  ]);
  expect(sayWithPlace(findings[0])).toMatch(words);
  expect(sayWithPlace(findings[0])).not.toMatch(/\{|undefined|NaN/);
}

describe('times that no filter can be made from', () => {
  it('have a gap', async () => {
    await expectBlocker(
      timedText((n) => (n >= 400 ? 0.005 : 0)),
      /6,000 µs before sample 400/,
      400,
    );
  });

  it('have one sample lost', async () => {
    await expectBlocker(
      timedText((n) => (n >= 700 ? 0.001 : 0)),
      /2,000 µs before sample 700/,
      700,
    );
  });

  it('have a gap as long as the rest, of 1,000 samples', async () => {
    await expectBlocker(
      timedText((n) => (n >= 400 ? 1 : 0)),
      /before sample 400, (1,000|1,00[01]|999)(\.\d+)? samples/,
      400,
    );
  });

  it('have a gap where the first time is printed as 0', async () => {
    const print = (time: number) => String(Number(time.toFixed(6)));
    await expectBlocker(
      timedText((n) => (n >= 400 ? 0.005 : 0), print),
      /6,000 µs before sample 400/,
      400,
    );
  });

  it('have a gap and are printed coarsely', async () => {
    const text = timedText(
      (n) => (n >= 400 ? 0.05 : 0),
      (time) => time.toFixed(2),
    );
    await expectBlocker(text, /before sample 400/, 400);
  });

  it('have a gap and are in milliseconds', async () => {
    const text = timedText(
      (n) => (n >= 400 ? 0.005 : 0),
      (time) => (time * 1000).toFixed(3),
      'Time [ms]',
    );
    await expectBlocker(text, /6,000 µs before sample 400/, 400);
  });

  it('step back', async () => {
    await expectBlocker(
      timedText((n) => (n >= 400 ? -0.003 : 0)),
      /back by 2,000 µs at sample 400/,
      400,
    );
  });

  it('start again', async () => {
    await expectBlocker(
      timedText((n) => (n >= 600 ? -0.6 : 0)),
      /back by 599,000 µs at sample 600/,
      600,
    );
  });

  it('start again halfway, so that they do not rise on the whole', async () => {
    await expectBlocker(
      timedText((n) => (n >= 500 ? -0.5 : 0)),
      /sample 500/,
      500,
    );
  });

  it('repeat', async () => {
    await expectBlocker(
      timedText((n) => (n === 500 ? -0.001 : 0)),
      /sample 500/,
      500,
    );
  });

  it.each(['', 'nan'])('miss one, written "%s"', async (missing) => {
    const print = (time: number) => (Math.abs(time - 0.3) < 1e-9 ? missing : time.toFixed(6));
    await expectBlocker(
      timedText(() => 0, print),
      /missing/,
      300,
    );
  });

  it.each(['', 'nan'])('miss the first or the last one, written "%s"', async (missing) => {
    for (const at of [0, 0.999]) {
      const print = (time: number) => (Math.abs(time - at) < 1e-9 ? missing : time.toFixed(6));
      const { recording, findings } = await openBytes(timedText(() => 0, print));
      expect(recording).toBeNull();
      expect(findings).toMatchObject([{ code: 'uneven-time', severity: 'blocker' }]);
    }
  });

  it('step back before one is missing', async () => {
    const print = (time: number) => (Math.abs(time - 0.7) < 1e-9 ? '' : time.toFixed(6));
    const { recording } = await openBytes(timedText((n) => (n === 300 ? -0.005 : 0), print));
    expect(recording).toBeNull();
  });

  it('stand still, fall or are infinite', async () => {
    expect((await openBytes(timedText((n) => -n / 1000))).recording).toBeNull();
    expect((await openBytes(timedText((n) => -n / 500))).recording).toBeNull();
    expect((await openBytes('t,a\n5,1\n5,2\n')).recording).toBeNull();
    expect((await openBytes('t,a\n0.0,1\n0.1,2\ninf,3\n')).recording).toBeNull();
    expect((await openBytes('t,a\n-inf,1\n0.0,2\n0.1,3\n')).recording).toBeNull();
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sayWithPlace } from '../../../../core/findings/say';
import { encoded, openBytes, samplesOf } from '../../../support/textBytes';

// Whatever the bytes, opening neither throws nor hangs: it yields a recording that can be read wholly, or a blocker.

const rows = (count: number, print: (n: number) => string) =>
  Array.from({ length: count }, (_, n) => print(n)).join('');

const samples: Uint8Array[] = [
  encoded(`time,a,"b, x"\n${rows(40, (n) => `${(n / 100).toFixed(2)},${n % 7},-${n % 3}.5\n`)}`),
  encoded(`t;a\r\ns;V\r\n# x\r\n${rows(40, (n) => `${n};${n % 7},25;\r\n`)}`, 'utf-8', true),
  encoded(`; dat\n${rows(40, (n) => `  ${(n / 8000).toPrecision(6)}   0.${n}e-3 \n`)}`),
  encoded(`when\ta\n${rows(40, (n) => `2024-01-01T00:00:${10 + n}.5Z\t"${n % 7}"\n`)}`),
  encoded(`a\tb\n${rows(40, (n) => `${n % 7},5\t\n`)}`, 'utf-16le', true),
  encoded(
    rows(40, (n) => `${n % 7}\r`),
    'utf-16be',
  ),
];

// What means something to the reader hits more than random bytes do.
const tellingBytes = [...'0159.,;\t \n\r"-+eEdnaifT:Z#%/'].map((c) => c.charCodeAt(0));
const byte = fc.oneof(
  fc.constantFrom(...tellingBytes, 0, 0xff, 0xef, 0xfe),
  fc.integer({ min: 0, max: 255 }),
);

async function expectSound(bytes: Uint8Array): Promise<void> {
  for (const kept of [undefined, 8]) {
    const { recording, findings } = await openBytes(bytes, kept);
    for (const found of findings) expect(sayWithPlace(found)).not.toMatch(/\{\w+\}|undefined/);
    expect(recording === null).toBe(findings.some(({ severity }) => severity === 'blocker'));
    if (recording === null) continue;
    expect(recording.samples).toBeGreaterThanOrEqual(2);
    expect(recording.channels.length).toBeGreaterThanOrEqual(1);
    if (recording.sampleRate !== null) {
      expect(recording.sampleRate).toBeGreaterThan(0);
      expect(recording.sampleRate).toBeLessThan(Number.POSITIVE_INFINITY);
    }
    const values = await samplesOf(recording);
    expect(values.map((plane) => plane.length)).toEqual(recording.channels.map(() => recording.samples));
    expect(values.flat().every((value) => typeof value === 'number')).toBe(true);
  }
}

/** A sample with some bytes overwritten, some put in, some taken out, and its end cut off. */
const damaged = fc
  .record({
    which: fc.nat(samples.length - 1),
    edits: fc.array(fc.record({ at: fc.nat(2000), kind: fc.constantFrom('set', 'insert', 'remove'), byte }), {
      maxLength: 8,
    }),
    cut: fc.option(fc.nat(2000)),
  })
  .map(({ which, edits, cut }) => {
    const bytes = [...samples[which]];
    for (const { at, kind, byte } of edits) {
      bytes.splice(at % bytes.length, kind === 'insert' ? 0 : 1, ...(kind === 'remove' ? [] : [byte]));
    }
    return Uint8Array.from(cut === null ? bytes : bytes.slice(0, cut % bytes.length));
  });

describe('damaged text', () => {
  it('is sound before it is damaged', async () => {
    for (const bytes of samples) {
      expect((await openBytes(bytes)).recording).not.toBeNull();
      await expectSound(bytes);
    }
  });

  it('with single bytes changed, put in or lost, or cut off', async () => {
    await fc.assert(fc.asyncProperty(damaged, expectSound), { numRuns: 800, seed: 5 });
  });

  it('of random bytes', async () => {
    const random = fc.array(byte, { maxLength: 400 }).map((list) => Uint8Array.from(list));
    await fc.assert(fc.asyncProperty(random, expectSound), { numRuns: 800, seed: 6 });
  });

  it('of random rows', async () => {
    const cell = fc.constantFrom(
      '1',
      '-2.5',
      '3,5',
      '',
      'nan',
      'inf',
      '"4"',
      '"',
      'x',
      '1e400',
      '0',
      '2024-01-01 00:00:01',
    );
    const line = fc
      .tuple(fc.array(cell, { minLength: 1, maxLength: 4 }), fc.constantFrom(',', ';', '\t', ' ', ', '))
      .map(([cells, separator]) => cells.join(separator));
    const text = fc
      .tuple(fc.constantFrom('', 'time,a\n'), fc.array(line, { maxLength: 12 }))
      .map(([header, lines]) => encoded(header + lines.join('\n')));
    await fc.assert(fc.asyncProperty(text, expectSound), { numRuns: 1500, seed: 7 });
  });

  it('of a quarter of a mebibyte of anything: a step that grew with the square would never end', async () => {
    for (const fill of [
      '"',
      ',',
      ' ',
      '\t',
      '\n',
      '\r',
      '1',
      '.',
      '-',
      '1,',
      '1\n',
      '"\n',
      '",',
      '1e',
      ' "',
      '\0',
      '"1',
      '9',
    ]) {
      await expectSound(encoded(fill.repeat((1 << 18) / fill.length)));
      await expectSound(encoded(`1,2\n3,4\n${fill.repeat((1 << 18) / fill.length)}`));
    }
  });
});

import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { needs, python } from '../../../support/programs';
import { normals } from '../../../support/random';
import { readText } from '../../../support/textBytes';

// Reference: numpy.loadtxt and numpy.savetxt, and SoX's own text format (.dat) against its raw doubles.

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'text-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

const place = (name: string) => join(folder, name);
const bytesOf = (name: string) => new Uint8Array(readFileSync(place(name)));

/** Doubles written by a program, row after row. */
function doubles(name: string): Float64Array {
  return new Float64Array(bytesOf(name).slice().buffer);
}

/** Every value against the reference, in which the first `skip` columns are no channels. */
function expectRows(values: number[][], reference: Float64Array, columns: number, skip = 0): void {
  expect(values.length).toBe(columns - skip);
  expect(values[0].length).toBe(reference.length / columns);
  values.forEach((plane, c) => {
    const wrong = plane.findIndex((value, n) => !Object.is(value, reference[n * columns + c + skip]));
    expect(wrong).toBe(-1);
  });
}

function runPython(script: string): void {
  execFileSync(python, ['-c', `import numpy as np\n${script}`], { cwd: folder });
}

const spelled = [
  (x: number) => String(x),
  (x: number) => x.toFixed(4),
  (x: number) => x.toExponential(7),
  (x: number) => x.toPrecision(17),
];

describe.skipIf(!needs('scipy'))('against numpy', () => {
  it.each([
    ['commas', ',', '', 'delimiter=","'],
    ['semicolons', ';', '', 'delimiter=";"'],
    ['tabs', '\t', '', 'delimiter="\\t"'],
    ['blanks', '   ', '', ''],
    ['commas and blanks', ' ,  ', '', 'delimiter=","'],
    ['a header', ',', 'x,y,z\n', 'delimiter=",", skiprows=1'],
    ['comments', ' ', '# one\n# two\n', ''],
    ['comments in percent', ';', '% one\n', 'delimiter=";", comments="%"'],
  ])('reads as loadtxt does, %s', async (name, separator, header, options) => {
    const noise = normals(5, 3000);
    const rows = Array.from({ length: 1000 }, (_, n) =>
      [0, 1, 2].map((c) => spelled[(n + c) % 4](noise[3 * n + c] * 10 ** ((n % 40) - 20))).join(separator),
    );
    rows[700] = ['nan', 'inf', '-inf'].join(separator);
    writeFileSync(place(`${name}.txt`), `${header}${rows.join('\n')}\n`);
    runPython(`np.loadtxt("${name}.txt", ${options}).tofile("${name}.f64")`);
    const { values } = await readText(bytesOf(`${name}.txt`));
    expectRows(values, doubles(`${name}.f64`), 3);
  });

  it.each([
    ['as it stands', '', ''],
    ['with commas and a header', 'delimiter=",", header="a,b,c"', 'delimiter=","'],
    ['with a plain header', 'delimiter=";", header="a;b;c", comments=""', 'delimiter=";", skiprows=1'],
    ['with %g', 'fmt="%g"', ''],
    ['with %.12g and tabs', 'fmt="%.12g", delimiter="\\t"', 'delimiter="\\t"'],
    ['with CR LF', 'newline="\\r\\n"', ''],
    ['in UTF-16', 'encoding="utf-16"', 'encoding="utf-16"'],
  ])('reads what savetxt writes, %s', async (name, saved, loaded) => {
    runPython(`
x = np.random.default_rng(3).standard_normal((5000, 3)) * 10.0 ** (np.arange(15000).reshape(5000, 3) % 7 - 3)
np.savetxt("${name}.txt", x, ${saved})
np.loadtxt("${name}.txt", ${loaded}).tofile("${name}.f64")`);
    const { values, recording } = await readText(bytesOf(`${name}.txt`), 100);
    expectRows(values, doubles(`${name}.f64`), 3);
    expect(recording.sampleRate).toBeNull();
  });

  it('finds the rate of times that savetxt writes', async () => {
    for (const rate of [1000, 44100]) {
      runPython(`
t = np.arange(20000) / ${rate}
np.savetxt("times.txt", np.column_stack([t, np.sin(t * t)]))`);
      const { recording, codes } = await readText(bytesOf('times.txt'));
      expect(recording.sampleRate).toBe(rate);
      expect(codes).toEqual(['taken-as-time']);
    }
  });
});

describe.skipIf(!needs('sox'))('against SoX', () => {
  // The time column of .dat has 8 significant digits and starts with 0.
  it.each([8000, 44100, 48000])('reads .dat text of %d Hz', async (rate) => {
    const tone = ['-r', String(rate), '-n', '-c', '2'];
    const synth = ['synth', '2', 'sine', '441', 'sine', '1000', 'vol', '0.7'];
    for (const name of ['tone.dat', 'tone.f64'])
      execFileSync('sox', ['-D', ...tone, name, ...synth], { cwd: folder });
    const { values, recording } = await readText(bytesOf('tone.dat'));
    expect(recording.channels.length).toBe(2);
    // SoX prints 11 significant digits of values below 1.
    const reference = doubles('tone.f64');
    expect(values[0].length).toBe(reference.length / 2);
    values.forEach((plane, c) => {
      const worst = plane.reduce(
        (most, value, n) => Math.max(most, Math.abs(value - reference[2 * n + c])),
        0,
      );
      expect(worst).toBeLessThanOrEqual(5e-12);
    });
    // The last times, from 1 s on, have 7 decimals.
    expect(Math.abs(rate / recording.sampleRate! - 1)).toBeLessThanOrEqual(1e-7 / 2 + 1e-12);
  });
});

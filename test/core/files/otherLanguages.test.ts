import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { csvTaps } from '../../../core/files/csvTaps';
import { readMark } from '../../../core/files/generatedMark';
import { npyTaps } from '../../../core/files/npyTaps';
import { rustTaps } from '../../../core/files/rustTaps';
import { rustVectors } from '../../../core/files/rustVectors';
import { hostileNames } from '../../support/hostileNames';
import { needs, python } from '../../support/programs';
import { type SampleOptions, sampleResult } from '../../support/sampleResult';

const mark = { document: 'belt.pairing.json', digest: 'a'.repeat(64) };
const formats: SampleOptions[] = [
  {},
  { word: 8, order: 'oldest-first' },
  { word: 24, accumulator: 56, inputs: ['tube'], job: 'equalise' },
  { word: 'float32', order: 'oldest-first' },
  { word: 'float64', job: 'identify', delay: -3 },
];

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'taps-'));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** Rows of the values as the files hold them. */
function rows(options: SampleOptions): number[][] {
  const all = sampleResult(options).arithmetic.values.map((row) => Array.from(row));
  return options.order === 'oldest-first' ? all.map((row) => row.reverse()) : all;
}

function allNamed(text: string): SampleOptions {
  return { title: text, file: text, inputs: [text, text], desired: text };
}

// No Debian package that the tests bring along: run where a Rust compiler happens to be.
describe.skipIf(!needs('rustc'))('SYMBOL_taps.rs, built by rustc', () => {
  it.each(formats)('is a module without warnings whose values read back: %o', (options) => {
    writeFileSync(join(folder, 'belt_taps.rs'), rustTaps(sampleResult(options), mark));
    writeFileSync(join(folder, 'lib.rs'), '#![no_std]\npub mod belt_taps;\n');
    execFileSync('rustc', ['--crate-type', 'lib', '-D', 'warnings', 'lib.rs'], { cwd: folder });
    const main = `#[allow(dead_code)]
mod belt_taps;
fn main() { println!("{:?}", belt_taps::TAPS); }
`;
    writeFileSync(join(folder, 'main.rs'), main);
    execFileSync('rustc', ['main.rs'], { cwd: folder });
    const printed = execFileSync(join(folder, 'main'), { encoding: 'utf8' });
    const round = options.word === 'float32' ? Math.fround : Number;
    expect((JSON.parse(printed) as number[][]).map((row) => row.map(round))).toEqual(rows(options));
  });
});

describe.skipIf(!needs('rustc'))('SYMBOL_vectors.rs beside it, built by rustc', () => {
  it.each([{}, { order: 'oldest-first', word: 12 }] as SampleOptions[])(
    'come out of a plain filter in Rust: %o',
    (options) => {
      const attributes = { cBefore: '', cAfter: '', rust: '#[link_section = ".belt"] #[used]' };
      const result = sampleResult({ ...options, attributes });
      writeFileSync(join(folder, 'belt_taps.rs'), rustTaps(result, mark));
      writeFileSync(join(folder, 'belt_vectors.rs'), rustVectors(result, mark));
      const main = `#[allow(dead_code)]
mod belt_taps;
#[allow(dead_code)]
mod belt_vectors;
use belt_taps::*;
use belt_vectors::*;
fn main() {
    let mut wrong = 0;
    for n in 0..VECTOR_SAMPLES {
        let mut acc: i64 = 1i64 << FRACTION_BITS >> 1;
        for r in 0..INPUTS {
            for k in 0..LENGTH.min(n + 1) {
                let at = if NEWEST_FIRST { k } else { LENGTH - 1 - k };
                acc += TAPS[r][at] as i64 * INPUT[r][n - k] as i64;
            }
        }
        let y = (acc >> FRACTION_BITS).clamp(i16::MIN as i64, i16::MAX as i64);
        if y != EXPECTED[n] as i64 { wrong += 1; }
    }
    println!("{} {}", wrong, VECTOR_EXCERPT);
}
`;
      writeFileSync(join(folder, 'main.rs'), main);
      execFileSync('rustc', ['-D', 'warnings', 'main.rs'], { cwd: folder });
      expect(execFileSync(join(folder, 'main'), { encoding: 'utf8' })).toBe('0 0\n');
    },
  );
});

describe('SYMBOL_taps.rs', () => {
  it.each(hostileNames)('keeps %j inside comments', (hostile) => {
    const text = rustTaps(sampleResult(allNamed(hostile)), mark);
    const code = (source: string) => source.replace(/^ *\/\/.*\n/gm, '');
    expect(code(text)).toBe(code(rustTaps(sampleResult(), mark)));
  });
});

describe('SYMBOL_taps.csv', () => {
  it.each(formats)('has a row for each delay, with values that read back: %o', (options) => {
    const lines = csvTaps(sampleResult(options), mark).trimEnd().split('\n');
    const table = lines.filter((line) => !line.startsWith('#')).map((line) => line.split(','));
    expect(table[0]).toEqual(['k', ...rows(options).map((_, r) => `tap_${r}`)]);
    const delays = table.slice(1).map(([k]) => Number(k));
    expect(delays).toEqual(
      delays.map((_, i) => (options.order === 'oldest-first' ? delays.length - 1 - i : i)),
    );
    const round = options.word === 'float32' ? Math.fround : Number;
    const read = rows(options).map((_, r) => table.slice(1).map((cells) => round(Number(cells[r + 1]))));
    expect(read).toEqual(rows(options));
  });

  it.each(hostileNames)('keeps %j inside comment lines', (hostile) => {
    const lines = csvTaps(sampleResult(allNamed(hostile)), mark).split('\n');
    expect(lines.filter((line) => !line.startsWith('#'))).toEqual(
      csvTaps(sampleResult(), mark)
        .split('\n')
        .filter((line) => !line.startsWith('#')),
    );
  });
});

describe('SYMBOL_taps.npy', () => {
  it('begins its data at a multiple of 64 and carries the mark in its first line (NPY format 1.0)', () => {
    for (const document of ['a', 'b'.repeat(40), 'ö'.repeat(30)]) {
      const bytes = npyTaps(sampleResult(), { ...mark, document });
      const header = bytes[8] + 256 * bytes[9];
      expect((10 + header) % 64).toBe(0);
      expect(bytes[9 + header]).toBe(0x0a);
      expect(bytes.length).toBe(10 + header + 2 * 64 * 2);
      expect(readMark(new TextDecoder().decode(bytes))).toEqual({ ...mark, document });
      expect(readMark(Buffer.from(bytes).toString('latin1'))).toEqual({ ...mark, document });
    }
  });

  describe.skipIf(!needs('scipy'))('read by NumPy', () => {
    const script = `import json, sys, numpy
a = numpy.load(sys.argv[1])
print(json.dumps([str(a.dtype), a.shape, a.astype(float).tolist()]))`;
    const types = ['int16', 'int8', 'int32', 'float32', 'float64'];

    it.each(formats.map((options, i) => [types[i], options] as const))('as %s: %o', (type, options) => {
      const path = join(folder, 'belt_taps.npy');
      writeFileSync(path, npyTaps(sampleResult(options), { ...mark, document: hostileNames[11] }));
      const printed = execFileSync(python, ['-W', 'error', '-c', script, path], { encoding: 'utf8' });
      const expected = rows(options);
      expect(JSON.parse(printed)).toEqual([type, [expected.length, expected[0].length], expected]);
    });
  });
});

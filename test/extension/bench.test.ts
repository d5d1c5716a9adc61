import { execFileSync } from 'node:child_process';
import { readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { benchCopy, snapshot, tapwright } from '../support/cli';
import { needs } from '../support/programs';
import { integerProgram } from '../support/vectorProgram';

// The main job on the sample bench, as `npm start` runs it.

const documents = [
  ['belt.pairing.json', 'belt'],
  ['valve.pairing.json', 'valve'],
  ['tubing.pairing.json', 'tubing'],
] as const;

let bench: string;
beforeAll(() => {
  bench = benchCopy();
});

const taps = (name: string) =>
  JSON.parse(readFileSync(join(bench, 'generated', `${name}.taps.json`), 'utf8'));

describe.each(documents)('%s', (document, name) => {
  it('designs with the held-out NMSE that its scenario allows', () => {
    const { status, out, err } = tapwright(bench, 'design', document, '--json');
    expect(err.replace(/^.*\[spectral-null\]\n/m, '')).toBe('');
    expect(status).toBe(0);
    const result = JSON.parse(out);
    // Known from how the recordings were made.
    const { idealNmseDb } = JSON.parse(readFileSync(join(bench, 'ideal.json'), 'utf8'))[document];
    expect(Math.abs(result.heldOut.nmseDb - idealNmseDb)).toBeLessThan(0.3);
    expect(result.arithmetic.quantisationLossDb).toBeLessThanOrEqual(0.1);
    expect(result.arithmetic.overflows).toBe(0);
    // The tubing's path falls by some 40 dB towards half the sample rate; nothing else is wrong with the bench.
    const expected = name === 'tubing' ? ['spectral-null'] : [];
    expect(result.findings.map(({ code }: { code: string }) => code)).toEqual(expected);
    const { taps: version, generated, files, self, ...figures } = taps(name);
    expect(version).toBe(1);
    const { written, ...printed } = result;
    expect(printed).toEqual(figures);
    expect(generated).toContain(document);
    expect(written.at(-1).path).toBe(`generated/${name}.taps.json`);
    expect(Object.keys(files).length).toBe(written.length - 1);
    expect(self).toMatch(/^[0-9a-f]{64}$/);
  });

  it('is current when checked, and writes nothing new when designed again', () => {
    const before = snapshot(bench);
    expect(tapwright(bench, 'check', document)).toEqual({
      status: 0,
      out: `${document}: current\n`,
      err: '',
    });
    const again = tapwright(bench, 'design', document);
    expect(again.status).toBe(0);
    expect(again.out).not.toMatch(/^ {2}(new|changed) /m);
    expect(snapshot(bench)).toEqual(before);
  });

  it.skipIf(!needs('gcc') || !needs('g++')).each([
    ['gcc', '-std=c99', 'c'],
    ['g++', '-std=c++11', 'cc'],
  ])('compiles without a warning with %s %s, and the test vectors pass', (compiler, standard, ending) => {
    const folder = join(bench, 'generated');
    const symbol: string = taps(name).write.symbol;
    const source = join(folder, `test_${symbol}.${ending}`);
    writeFileSync(
      source,
      integerProgram.replaceAll('belt_', `${symbol}_`).replaceAll('BELT_', `${symbol.toUpperCase()}_`),
    );
    const program = join(folder, `test_${symbol}_${ending}`);
    execFileSync(compiler, [standard, '-Wall', '-Wextra', '-Werror', '-pedantic', source, '-o', program]);
    execFileSync(program);
    rmSync(source);
    rmSync(program);
  });
});

describe('tapwright check', () => {
  const document = 'valve.pairing.json';
  const file = (...parts: string[]) => join(bench, ...parts);
  const changing = (path: string, change: (text: string) => string, run: () => void) => {
    const before = readFileSync(path, 'latin1');
    const after = change(before);
    expect(after).not.toBe(before);
    writeFileSync(path, after, 'latin1');
    try {
      run();
    } finally {
      writeFileSync(path, before, 'latin1');
    }
  };
  const expectFailed = (code: string, at: string) => {
    const { status, out } = tapwright(bench, 'check', document);
    expect(out).toMatch(new RegExp(`^${at}:\\d+:\\d+: error: .*\\[${code}\\]$`, 'm'));
    expect(status).toBe(1);
  };
  const expectCurrent = () => expect(tapwright(bench, 'check', document).status).toBe(0);

  it.each([
    ['a tap in the header', ['generated', 'valve_taps.h'], /(-?\d+), /, 'edited', 'generated/valve_taps.h'],
    ['the note', ['generated', 'valve.note.md'], /held-out/i, 'edited', 'generated/valve.note.md'],
    [
      'a figure in the taps file',
      ['generated', 'valve.taps.json'],
      /"nmseDb": -\d/,
      'edited',
      'generated/valve.taps.json',
    ],
    [
      'the length in the document',
      ['valve.pairing.json'],
      /"length": 12/,
      'stale-document',
      'generated/valve.taps.json',
    ],
    ['a sample of the recording', ['valve.csv'], /\n100;[^;]*/, 'stale-recording', 'valve.csv'],
  ] as const)('sees that %s has changed', (_, path, pattern, code, at) => {
    changing(
      file(...path),
      (text) =>
        text.replace(pattern, (found) =>
          found.replace(/\d(?!.*\d)/, (digit) => String((Number(digit) + 1) % 10)).replace(/held/i, 'HELD'),
        ),
      () => expectFailed(code, at.replaceAll('.', '\\.')),
    );
    expectCurrent();
  });

  it('sees that a file is gone', () => {
    const header = file('generated', 'valve_vectors.h');
    const before = readFileSync(header);
    rmSync(header);
    expectFailed('missing-output', 'generated/valve_vectors\\.h');
    writeFileSync(header, before);
    expectCurrent();
  });

  it('does not mind another layout of the document, nor other line ends', () => {
    changing(file(document), (text) => JSON.stringify(JSON.parse(text), null, 7), expectCurrent);
    changing(file('generated', 'valve_taps.h'), (text) => text.replaceAll('\n', '\r\n'), expectCurrent);
    changing(file('valve.csv'), (text) => text.replaceAll('\r\n', '\n'), expectCurrent);
    changing(file('generated', 'valve.taps.json'), (text) => text.replaceAll('\n', '\r\n'), expectCurrent);
  });

  it('fails where the result is over its limit, and design writes the files all the same', () => {
    changing(
      file(document),
      (text) => text.replace(/"heldOutNmse": -\d+(\.\d+)?/, '"heldOutNmse": -60'),
      () => {
        const { status, err } = tapwright(bench, 'design', document);
        expect(err).toMatch(/valve\.pairing\.json:\d+:\d+: warning: .*-60.*\[over-limit\]/);
        expect(status).toBe(1);
        const note = readFileSync(file('generated', 'valve.note.md'), 'utf8');
        expect(note.indexOf('-60')).toBeLessThan(
          note.indexOf('## '.repeat(1), note.indexOf('## ') + 3) + 4000,
        );
        const checked = tapwright(bench, 'check', document);
        expect(checked.out).toMatch(/\[over-limit\]/);
        expect(checked.status).toBe(1);
      },
    );
    expect(tapwright(bench, 'design', document).status).toBe(0);
  });

  it('prints its state as one JSON object', () => {
    const { status, out } = tapwright(bench, 'check', document, '--json');
    expect(status).toBe(0);
    expect(JSON.parse(out)).toMatchObject({ state: 'current', findings: [] });
    expect(JSON.parse(out)).not.toHaveProperty('taps');
  });
});

describe('tapwright pair', () => {
  it('draws a document from two channels that designs as it stands', () => {
    const { status, out } = tapwright(
      bench,
      'pair',
      'tubing.wav',
      '--job',
      'equalise',
      '-o',
      'own.pairing.json',
    );
    expect(status).toBe(0);
    expect(out).toBe('wrote own.pairing.json: equalise, input 1 of tubing.wav, desired 2 of tubing.wav\n');
    const designed = tapwright(bench, 'design', 'own.pairing.json', '--json');
    // 64 taps are too few here, which the residual tells.
    expect(designed.err.match(/\[[a-z-]+\]$/gm)).toEqual(['[spectral-null]', '[taps-missing]']);
    expect(designed.status).toBe(0);
    expect(JSON.parse(designed.out).heldOut.nmseDb).toBeLessThan(-15);
    const again = tapwright(bench, 'pair', 'tubing.wav', '-o', 'own.pairing.json');
    expect(again.err).toMatch(/\[document-exists\]/);
    expect(again.status).toBe(2);
  });

  it('takes several inputs by name', () => {
    const args = [
      'slow.csv',
      '--input',
      'frame_x',
      '--input',
      'frame_z',
      '--desired',
      'cell',
      '--job',
      'cancel',
    ];
    const { status, out } = tapwright(
      bench,
      'pair',
      ...args,
      '--rate',
      '800',
      '-o',
      'two.pairing.json',
      '--json',
    );
    expect(status).toBe(0);
    expect(JSON.parse(out)).toMatchObject({ inputs: ['frame_x', 'frame_z'], desired: 'cell', job: 'cancel' });
  });
});

describe('tapwright apply', () => {
  /** Samples of a 32-bit float WAV, by its own chunks. */
  function wavSamples(path: string): Float32Array {
    const bytes = readFileSync(path);
    const data = bytes.indexOf('data', 12, 'latin1');
    return new Float32Array(bytes.buffer.slice(bytes.byteOffset + data + 8));
  }

  it('filters a recording as the sum over taps says', () => {
    const run = tapwright(bench, 'apply', 'generated/tubing.taps.json', 'tubing.wav', '-o', 'restored.wav');
    expect(run.err).toBe('');
    expect(run.status).toBe(0);
    const restored = wavSamples(join(bench, 'restored.wav'));
    const { coefficients, means } = taps('tubing');
    const pcm = readFileSync(join(bench, 'tubing.wav'));
    const data = pcm.indexOf('data', 12, 'latin1') + 8;
    const x = (n: number) => (n < 0 ? 0 : pcm.readInt16LE(data + 4 * n) / 32768 - means.inputs[0]);
    expect(restored.length).toBe((pcm.length - data) / 4);
    for (const n of [0, 1, 50, 1023, 1024, 5000, restored.length - 1]) {
      const y = coefficients[0].reduce(
        (sum: number, w: number, k: number) => sum + w * x(n - k),
        means.desired,
      );
      expect(Math.abs(restored[n] - y)).toBeLessThan(1e-7 * Math.max(1, Math.abs(y)));
    }
  });

  it('writes the cleaned signal for noise cancelling', () => {
    const run = tapwright(
      bench,
      'apply',
      'generated/belt.taps.json',
      'slow.csv',
      '-o',
      'clean.wav',
      '--json',
    );
    expect(run.status).toBe(0);
    expect(JSON.parse(run.out)).toMatchObject({
      wanted: 'error',
      inputs: ['frame_x', 'frame_z'],
      desired: 'cell',
    });
    const power = (samples: Float32Array) => {
      const mean = samples.reduce((s, v) => s + v, 0) / samples.length;
      return samples.reduce((s, v) => s + (v - mean) ** 2, 0) / samples.length;
    };
    // The empty belt at the end: what is left of the disturbance.
    const clean = wavSamples(join(bench, 'clean.wav')).slice(-4000);
    const cell = readFileSync(join(bench, 'slow.csv'), 'utf8').trim().split('\n').slice(-4000);
    const column = cell[0].split(',').length - 1;
    const raw = Float32Array.from(cell, (row) => Number(row.split(',')[column]));
    expect(10 * Math.log10(power(clean) / power(raw))).toBeLessThan(-20);
  });
});

describe('tapwright inspect', () => {
  it('prints a recording with the keys of the contract', () => {
    const { status, out } = tapwright(bench, 'inspect', 'valve.csv', '--json');
    expect(status).toBe(0);
    const inspected = JSON.parse(out);
    expect(Object.keys(inspected)).toEqual([
      'file',
      'format',
      'sampleRate',
      'samples',
      'channels',
      'findings',
    ]);
    expect(inspected).toMatchObject({ file: 'valve.csv', sampleRate: 1000, samples: 16000 });
    expect(Object.keys(inspected.channels[0])).toEqual(['name', 'min', 'max', 'mean', 'rms']);
  });

  it('prints every recording of a document', () => {
    const { status, out } = tapwright(bench, 'inspect', 'belt.pairing.json', '--json');
    expect(status).toBe(0);
    const { recordings, takes } = JSON.parse(out);
    expect(recordings.map(({ file }: { file: string }) => file)).toEqual([
      'slow.csv',
      'medium.csv',
      'fast.csv',
    ]);
    expect(takes.length).toBe(3);
  });

  it('shows a table', () => {
    const { status, out } = tapwright(bench, 'inspect', 'tubing.wav');
    expect(status).toBe(0);
    expect(out).toMatch(/^tubing\.wav: WAV, PCM 16 bit, 96,000 samples, 8,000 Hz, 12 s\n {2}channel/);
  });
});

it('leaves no temporary file behind', () => {
  expect(readdirSync(join(bench, 'generated')).filter((name) => name.endsWith('.tmp'))).toEqual([]);
});

import { describe, expect, it } from 'vitest';
import { readDocument } from '../../../core/document/readDocument';
import { say } from '../../../core/findings/say';
import { minimal, problems, read, readClean, take } from './documents';

/** The example of the design document, comments taken out. */
const example = `{
  "pairing": 1,
  "title": "Checkweigher belt",
  "job": "cancel",
  "sampleRate": 2000,
  "takes": [
    {
      "name": "slow belt",
      "inputs":  [ { "file": "slow.csv", "channel": "frame_x" }, { "file": "slow.csv", "channel": "frame_z" } ],
      "desired":   { "file": "slow.csv", "channel": "cell" },
      "fit":     { "from": 0,  "to": 40 },
      "heldOut": { "from": 40, "to": 60 },
      "disturbanceOnly": { "from": 50, "to": 60 }
    }
  ],
  "prepare": { "removeMean": true, "band": null },
  "filter":  { "length": 64, "delay": 0, "regularisation": 1e-4, "windowing": "covariance" },
  "arithmetic": { "word": 16, "rounding": "error-aware", "accumulator": 40, "accumulatorOverflow": "wrap", "overflow": "saturate",
                  "input": { "word": 16, "fullScale": 4.0 }, "output": { "word": 16, "fullScale": 64.0 } },
  "write":   { "folder": "generated", "symbol": "belt", "languages": ["c"], "order": "newest-first", "testVectors": 256 },
  "limits":  { "heldOutNmse": -20, "quantisationLoss": 0.1 }
}`;

describe('a document in full', () => {
  it('is read key by key', () => {
    expect(readDocument(example)).toEqual({
      findings: [],
      document: {
        title: 'Checkweigher belt',
        job: 'cancel',
        sampleRate: 2000,
        takes: [
          {
            name: 'slow belt',
            inputs: [
              { file: 'slow.csv', channel: 'frame_x' },
              { file: 'slow.csv', channel: 'frame_z' },
            ],
            desired: { file: 'slow.csv', channel: 'cell' },
            fit: [{ from: 0, to: 40, samples: false }],
            heldOut: [{ from: 40, to: 60, samples: false }],
            disturbanceOnly: [{ from: 50, to: 60, samples: false }],
          },
        ],
        prepare: { removeMean: true, band: null },
        filter: {
          length: 64,
          delay: 0,
          regularisation: 1e-4,
          windowing: 'covariance',
          symmetry: 'none',
          fixedGain: null,
        },
        arithmetic: {
          word: 16,
          fractionBits: null,
          rounding: 'error-aware',
          accumulator: 40,
          accumulatorOverflow: 'wrap',
          overflow: 'saturate',
          input: { word: 16, fullScale: [4, 4] },
          output: { word: 16, fullScale: [64] },
          cyclesPerMac: 1,
        },
        write: {
          folder: 'generated',
          symbol: 'belt',
          languages: ['c'],
          order: 'newest-first',
          testVectors: 256,
          attributes: { cBefore: '', cAfter: '', rust: '' },
        },
        limits: { heldOutNmse: -20, quantisationLoss: 0.1 },
      },
    });
  });
});

describe('a document of the keys without defaults', () => {
  it('has all others filled in', () => {
    expect(readClean(minimal())).toEqual({
      title: 'Untitled filter',
      job: 'cancel',
      sampleRate: null,
      takes: [
        {
          name: 'take 1',
          inputs: [{ file: 'belt.csv', channel: 'frame' }],
          desired: { file: 'belt.csv', channel: 'cell' },
          fit: null,
          heldOut: null,
          disturbanceOnly: [],
        },
      ],
      prepare: { removeMean: true, band: null },
      filter: {
        length: 64,
        delay: 0,
        regularisation: 1e-6,
        windowing: 'covariance',
        symmetry: 'none',
        fixedGain: null,
      },
      arithmetic: {
        word: 16,
        fractionBits: null,
        rounding: 'error-aware',
        accumulator: 40,
        accumulatorOverflow: 'wrap',
        overflow: 'saturate',
        input: { word: 16, fullScale: null },
        output: { word: 16, fullScale: null },
        cyclesPerMac: 1,
      },
      write: {
        folder: 'generated',
        symbol: 'untitled_filter',
        languages: ['c'],
        order: 'newest-first',
        testVectors: 256,
        attributes: { cBefore: '', cAfter: '', rust: '' },
      },
      limits: { heldOutNmse: null, quantisationLoss: null },
    });
  });

  it('is itself an object', () => {
    for (const value of [[], null, 'pairing', 1]) expect(problems(value)).toEqual(['not-an-object at ']);
    expect(say(read([]).findings[0])).toBe('the document: got a list when expected an object in braces.');
  });
});

describe('the version', () => {
  it('is missed', () => {
    expect(problems({ job: 'cancel', takes: [take()] })).toEqual(['version-missing at pairing']);
  });

  it('is 1 and nothing else, and of another version nothing else is judged', () => {
    for (const pairing of [0, 2, 1.5, '1', null, true, [1]]) {
      expect(problems({ pairing, job: 'dance' })).toEqual(['version-unknown at pairing']);
    }
    expect(say(read({ pairing: 2 }).findings[0])).toMatch(/^got version 2 when expected "pairing": 1/);
  });
});

describe('keys at the top', () => {
  it('that have no default must be there', () => {
    expect(problems({ pairing: 1 })).toEqual(['missing-key at job', 'missing-key at takes']);
  });

  it('takes one of four jobs', () => {
    for (const job of ['cancel', 'identify', 'equalise', 'predict']) {
      expect(readClean(minimal({ job })).job).toBe(job);
    }
    for (const job of ['equalize', '', 'Cancel', 1, null]) {
      expect(problems(minimal({ job }))).toEqual(['not-one-of at job']);
    }
    expect(say(read(minimal({ job: 'equalize' })).findings[0])).toBe(
      'job: got the text "equalize" when expected one of cancel, identify, equalise, predict.',
    );
  });

  it('takes a rate above nought', () => {
    expect(readClean(minimal({ sampleRate: 44_100.5 })).sampleRate).toBe(44_100.5);
    expect(readClean(minimal({ sampleRate: null })).sampleRate).toBe(null);
    for (const sampleRate of [0, -1])
      expect(problems(minimal({ sampleRate }))).toEqual(['not-positive at sampleRate']);
    expect(problems(minimal({ sampleRate: 2e12 }))).toEqual(['out-of-range at sampleRate']);
    expect(problems(minimal({ sampleRate: '48000' }))).toEqual(['not-a-number at sampleRate']);
  });

  it('takes no number that overflows', () => {
    const { findings } = readDocument('{"pairing":1,"job":"cancel","takes":[],"sampleRate":1e999}');
    expect(findings.map(say)).toContain(
      'sampleRate: got a number too large for float64 when expected a number.',
    );
  });

  it('takes a title of one line', () => {
    expect(readClean(minimal({ title: '' })).title).toBe('Untitled filter');
    expect(readClean(minimal({ title: 'Förderband → Waage' })).title).toBe('Förderband → Waage');
    expect(readClean(minimal({ title: '🏭'.repeat(200) })).title).toHaveLength(400);
    expect(problems(minimal({ title: 'x'.repeat(201) }))).toEqual(['text-too-long at title']);
    expect(problems(minimal({ title: 7 }))).toEqual(['not-text at title']);
    for (const hidden of ['\n', '\t', '\0', '\u007f', '\u0085', '\u2028', '\u202e', '\u2066']) {
      expect(problems(minimal({ title: `a${hidden}b` }))).toEqual(['control-character at title']);
    }
  });

  it('shows hidden characters of what it quotes', () => {
    const { findings } = read(minimal({ title: '\u001b[31mred\u202e' }));
    expect(say(findings[0])).toContain('"\\u001b[31mred\\u202e"');
  });
});

describe('unknown keys', () => {
  it('are notes at every level', () => {
    const found = read({
      ...minimal({
        colour: 1,
        takes: [
          take({
            weather: 'rain',
            inputs: [{ file: 'a.csv', gain: 2 }],
            fit: [{ from: 0, to: 1, unit: 's' }],
          }),
        ],
        prepare: { detrend: true, band: { from: 0, to: 1, slope: 2 } },
        filter: { regularization: 1 },
        arithmetic: { input: { offset: 1 }, guard: 1 },
        write: { author: 'x' },
        limits: { worst: 1 },
        __proto__x: 1,
      }),
    });
    expect(found.document).not.toBe(null);
    expect(
      found.findings.map(({ code, severity, path }) => `${severity} ${code} ${path?.join('.')}`),
    ).toEqual(
      [
        'takes.0.inputs.0.gain',
        'takes.0.fit.0.unit',
        'takes.0.weather',
        'prepare.band.slope',
        'prepare.detrend',
        'filter.regularization',
        'arithmetic.input.offset',
        'arithmetic.guard',
        'write.author',
        'limits.worst',
        'colour',
        '__proto__x',
      ].map((path) => `note unknown-key ${path}`),
    );
    expect(found.findings.map(say)).toContain(
      'the key "regularization" is not known and changes nothing. Known here: length, delay, regularisation, windowing, symmetry, fixedGain.',
    );
  });

  it('never become values through the prototype', () => {
    const { document, findings } = readDocument('{"__proto__": {"pairing": 1, "job": "cancel"}, "takes": 3}');
    expect(document).toBe(null);
    expect(findings.map(({ code }) => code)).toEqual([
      'version-missing',
      'missing-key',
      'not-a-list',
      'unknown-key',
    ]);
  });

  it('passes over "$schema"', () => {
    readClean(minimal({ $schema: '../media/pairing.schema.json' }));
  });
});

describe('all that is wrong', () => {
  it('is told in one go, the worst first', () => {
    expect(
      problems({
        job: 'hum',
        note: 1,
        takes: [take({ desired: 3, fit: { from: 2, to: 1 } })],
        filter: { length: 0, delay: 0.5, regularisation: -1, windowing: 'hann' },
        write: { symbol: '1st', folder: '/tmp' },
        limits: [],
      }),
    ).toEqual([
      'version-missing at pairing',
      'not-one-of at job',
      'not-an-object at takes.0.desired',
      'range-reversed at takes.0.fit',
      'out-of-range at filter.length',
      'not-whole at filter.delay',
      'out-of-range at filter.regularisation',
      'not-one-of at filter.windowing',
      'path-absolute at write.folder',
      'symbol-form at write.symbol',
      'not-an-object at limits',
      'unknown-key at note',
    ]);
  });

  it('is cut off after a hundred, the weighty ones kept', () => {
    const many = Object.fromEntries(Array.from({ length: 300 }, (_, k) => [`key${k}`, k]));
    const { findings } = read(minimal({ ...many, job: 'hum' }));
    expect(findings).toHaveLength(101);
    expect(findings[0].code).toBe('not-one-of');
    expect(say(findings[100])).toBe('201 more findings are not shown.');
  });
});

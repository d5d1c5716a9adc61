import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Draft, draftDocument } from '../../../core/document/draftDocument';
import { jobs } from '../../../core/document/pairingDocument';
import { readDocument } from '../../../core/document/readDocument';
import { readClean } from './documents';

const draft: Draft = {
  title: 'Checkweigher belt',
  job: 'cancel',
  inputs: [{ file: 'slow.csv', channel: 'frame_x' }],
  desired: { file: 'slow.csv', channel: 'cell' },
  sampleRate: null,
  samples: 120_000,
  rate: 2000,
  length: 64,
};

const read = (changes: Partial<Draft>) => readClean(JSON.parse(draftDocument({ ...draft, ...changes })));
const split = (changes: Partial<Draft>) => {
  const { fit, heldOut } = read(changes).takes[0];
  return { fit: fit?.[0] ?? null, heldOut: heldOut?.[0] ?? null };
};

describe('a new document', () => {
  it('is text for people', () => {
    expect(draftDocument(draft)).toBe(`{
  "pairing": 1,
  "title": "Checkweigher belt",
  "job": "cancel",
  "takes": [
    {
      "name": "take 1",
      "inputs": [{ "file": "slow.csv", "channel": "frame_x" }],
      "desired": { "file": "slow.csv", "channel": "cell" },
      "fit": { "from": 0, "to": 40 },
      "heldOut": { "from": 40, "to": 60 }
    }
  ],
  "prepare": { "removeMean": true },
  "filter": { "length": 64, "delay": 0, "regularisation": 0.000001, "windowing": "covariance" },
  "arithmetic": {
    "word": 16,
    "rounding": "error-aware",
    "accumulator": 40,
    "accumulatorOverflow": "wrap",
    "overflow": "saturate",
    "input": { "word": 16 },
    "output": { "word": 16 }
  },
  "write": {
    "folder": "generated",
    "symbol": "checkweigher_belt",
    "languages": ["c"],
    "order": "newest-first",
    "testVectors": 256
  }
}
`);
  });

  it('has the delay of its job', () => {
    const delays = jobs.map((job) => read({ job, length: 21 }).filter.delay);
    expect(delays).toEqual([0, 0, 10, -1]);
  });

  it('names the rate only where the files do not', () => {
    expect(read({}).sampleRate).toBe(null);
    expect(read({ sampleRate: 2000 }).sampleRate).toBe(2000);
  });

  it('is fitted over two thirds on round figures, within the recording', () => {
    expect(split({ samples: 480_000, rate: 8000 })).toEqual({
      fit: { from: 0, to: 40, samples: false },
      heldOut: { from: 40, to: 60, samples: false },
    });
    expect(split({ samples: 123_457, rate: 44_100 })).toEqual({
      fit: { from: 0, to: 1.866, samples: false },
      heldOut: { from: 1.866, to: 2.799, samples: false },
    });
  });

  it('is in samples where no rate is known', () => {
    expect(split({ samples: 100, rate: null })).toEqual({
      fit: { from: 0, to: 66, samples: true },
      heldOut: { from: 66, to: 100, samples: true },
    });
  });

  it('has no intervals where there is nothing to share out', () => {
    for (const samples of [0, 1])
      expect(split({ samples, rate: null })).toEqual({ fit: null, heldOut: null });
    expect(split({ samples: 0, rate: 8000 })).toEqual({ fit: null, heldOut: null });
  });

  it('never has findings, and its intervals lie within the recording', () => {
    const track = fc.record({
      file: fc.constantFrom('a.wav', 'b/c.csv', '../x y.npy', 'log:12.csv', 'C:x.wav'),
      channel: fc.oneof(fc.integer({ min: 1, max: 64 }), fc.string({ minLength: 1, unit: 'binary' })),
    });
    const any = fc.record({
      title: fc.string({ unit: 'binary', maxLength: 300 }),
      job: fc.constantFrom(...jobs),
      inputs: fc.array(track, { minLength: 1, maxLength: 4 }),
      desired: track,
      sampleRate: fc.option(fc.double({ min: 0.001, max: 1e9, noNaN: true })),
      samples: fc.integer({ min: 0, max: 2 ** 40 }),
      rate: fc.option(fc.double({ min: 0.001, max: 1e9, noNaN: true })),
      length: fc.integer({ min: 1, max: 65_536 }),
    });
    fc.assert(
      fc.property(any, (given) => {
        const { document, findings } = readDocument(draftDocument(given));
        expect(findings).toEqual([]);
        const { fit, heldOut } = document!.takes[0];
        if (fit === null || heldOut === null) return;
        const scale = heldOut[0].samples ? 1 : given.rate!;
        expect(heldOut[0].from).toBe(fit[0].to);
        const end = Math.floor(heldOut[0].to * scale + 0.5);
        expect(end).toBeLessThanOrEqual(given.samples);
      }),
      { numRuns: 1000, seed: 1 },
    );
  });
});

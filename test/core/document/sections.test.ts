import { describe, expect, it } from 'vitest';
import { say } from '../../../core/findings/say';
import { type Entry, minimal, problems, read, readClean, take } from './documents';

const two = take({ inputs: [{ file: 'a.wav' }, { file: 'b.wav' }] });

describe('prepare', () => {
  const prepare = (changes: Entry) => minimal({ prepare: changes });

  it('takes a mean off or not', () => {
    expect(readClean(prepare({ removeMean: false })).prepare.removeMean).toBe(false);
    expect(problems(prepare({ removeMean: 0 }))).toEqual(['not-true-or-false at prepare.removeMean']);
  });

  it('has a band or none', () => {
    expect(readClean(prepare({ band: { from: 0, to: 50 } })).prepare.band).toEqual({ from: 0, to: 50 });
    expect(problems(prepare({ band: { from: 50, to: 50 } }))).toEqual(['range-empty at prepare.band']);
    expect(problems(prepare({ band: { from: 50, to: 5 } }))).toEqual(['range-reversed at prepare.band']);
    expect(problems(prepare({ band: { from: -1, to: 5 } }))).toEqual(['out-of-range at prepare.band.from']);
    expect(problems(prepare({ band: [0, 50] }))).toEqual(['not-an-object at prepare.band']);
  });
});

describe('filter', () => {
  const filter = (changes: Entry, job = 'cancel') => minimal({ job, filter: changes });

  it('has a length of whole taps', () => {
    for (const length of [1, 65_536]) expect(readClean(filter({ length })).filter.length).toBe(length);
    for (const length of [0, -3, 65_537])
      expect(problems(filter({ length }))).toEqual(['out-of-range at filter.length']);
    expect(problems(filter({ length: 2.5 }))).toEqual(['not-whole at filter.length']);
    expect(problems(filter({ length: '64' }))).toEqual(['not-a-number at filter.length']);
    expect(problems(filter({ length: null }))).toEqual(['not-a-number at filter.length']);
  });

  it('has a delay of whole samples, by default as the job needs it', () => {
    for (const delay of [-1e9, 0, 1e9]) expect(readClean(filter({ delay })).filter.delay).toBe(delay);
    expect(problems(filter({ delay: 1.5 }))).toEqual(['not-whole at filter.delay']);
    expect(problems(filter({ delay: -1e9 - 1 }))).toEqual(['out-of-range at filter.delay']);
    const byDefault = (job: string, changes: Entry = {}) => readClean(filter(changes, job)).filter.delay;
    expect(byDefault('cancel')).toBe(0);
    expect(byDefault('identify')).toBe(0);
    expect(byDefault('equalise')).toBe(32);
    expect(byDefault('equalise', { length: 11 })).toBe(5);
    expect(byDefault('predict')).toBe(-1);
  });

  it('has a regularisation of nought or more', () => {
    for (const regularisation of [0, 1e-12, 1e6]) {
      expect(readClean(filter({ regularisation })).filter.regularisation).toBe(regularisation);
    }
    for (const regularisation of [-1e-9, 1.1e6]) {
      expect(problems(filter({ regularisation }))).toEqual(['out-of-range at filter.regularisation']);
    }
    expect(problems(filter({ regularisation: 'NaN' }))).toEqual(['not-a-number at filter.regularisation']);
  });

  it('has one of two windowings', () => {
    expect(readClean(filter({ windowing: 'autocorrelation' })).filter.windowing).toBe('autocorrelation');
    expect(problems(filter({ windowing: 'hann' }))).toEqual(['not-one-of at filter.windowing']);
  });
});

describe('arithmetic', () => {
  const arithmetic = (changes: Entry, takes = [take()]) => minimal({ arithmetic: changes, takes });

  it('has coefficient words of the usual sizes', () => {
    for (const word of [8, 12, 16, 24, 32]) {
      expect(readClean(arithmetic({ word })).arithmetic).toMatchObject({
        word,
        input: { word: 16 },
        output: { word: 16 },
      });
    }
    for (const word of ['float32', 'float64']) {
      expect(readClean(arithmetic({ word })).arithmetic).toMatchObject({
        word,
        input: { word },
        output: { word },
      });
    }
    for (const word of [7, 64, 16.5, '16', 'float', null]) {
      expect(problems(arithmetic({ word }))).toEqual(['not-one-of at arithmetic.word']);
    }
  });

  it('has fraction bits below the accumulator', () => {
    expect(readClean(arithmetic({ fractionBits: 38 })).arithmetic.fractionBits).toBe(38);
    expect(readClean(arithmetic({ fractionBits: 62, accumulator: 64 })).arithmetic.fractionBits).toBe(62);
    expect(readClean(arithmetic({ fractionBits: null })).arithmetic.fractionBits).toBe(null);
    expect(problems(arithmetic({ fractionBits: 39 }))).toEqual([
      'fraction-bits-too-many at arithmetic.fractionBits',
    ]);
    expect(problems(arithmetic({ fractionBits: 63 }))).toEqual(['out-of-range at arithmetic.fractionBits']);
    expect(problems(arithmetic({ fractionBits: -1 }))).toEqual(['out-of-range at arithmetic.fractionBits']);
    readClean(arithmetic({ fractionBits: 39, word: 'float32' }));
  });

  it('has an accumulator of 8 to 64 bits', () => {
    for (const accumulator of [8, 64]) readClean(arithmetic({ accumulator }));
    for (const accumulator of [7, 65]) {
      expect(problems(arithmetic({ accumulator }))).toEqual(['out-of-range at arithmetic.accumulator']);
    }
    expect(problems(arithmetic({ accumulator: 40.5 }))).toEqual(['not-whole at arithmetic.accumulator']);
  });

  it('rounds and overflows in known ways', () => {
    const found = readClean(
      arithmetic({ rounding: 'nearest', accumulatorOverflow: 'saturate', overflow: 'wrap' }),
    );
    expect(found.arithmetic).toMatchObject({
      rounding: 'nearest',
      accumulatorOverflow: 'saturate',
      overflow: 'wrap',
    });
    expect(problems(arithmetic({ rounding: 'floor', accumulatorOverflow: 'trap', overflow: 1 }))).toEqual([
      'not-one-of at arithmetic.rounding',
      'not-one-of at arithmetic.accumulatorOverflow',
      'not-one-of at arithmetic.overflow',
    ]);
  });

  it('has signal words of 2 to 32 bits', () => {
    for (const word of [2, 32])
      expect(readClean(arithmetic({ input: { word } })).arithmetic.input.word).toBe(word);
    for (const word of [1, 33, 12.5, 'int16', null]) {
      expect(problems(arithmetic({ input: { word } }))).toEqual([
        'not-a-signal-word at arithmetic.input.word',
      ]);
    }
  });

  it('does not mix integers and floats', () => {
    readClean(arithmetic({ word: 'float32', output: { word: 'float32' } }));
    expect(problems(arithmetic({ word: 'float32', output: { word: 'float64' } }))).toEqual([
      'words-mixed at arithmetic.output.word',
    ]);
    expect(problems(arithmetic({ input: { word: 'float32' } }))).toEqual([
      'words-mixed at arithmetic.input.word',
    ]);
    expect(problems(arithmetic({ word: 'float64', output: { word: 16 } }))).toEqual([
      'words-mixed at arithmetic.output.word',
    ]);
    expect(say(read(arithmetic({ input: { word: 'float32' } })).findings[0])).toBe(
      'arithmetic.input.word: got float32 when the coefficients are 16-bit integers: the filter computes in integers or in one float type throughout.',
    );
  });

  it('has a full scale for all inputs or one for each', () => {
    const input = (fullScale: unknown) =>
      readClean(arithmetic({ input: { fullScale } }, [two])).arithmetic.input.fullScale;
    expect(input(4)).toEqual([4, 4]);
    expect(input([4, 0.5])).toEqual([4, 0.5]);
    expect(input(null)).toBe(null);
    const bad = (fullScale: unknown) => problems(arithmetic({ input: { fullScale } }, [two]));
    expect(bad([4])).toEqual(['full-scale-count at arithmetic.input.fullScale']);
    expect(bad([4, 0])).toEqual(['not-positive at arithmetic.input.fullScale.1']);
    expect(bad(-1)).toEqual(['not-positive at arithmetic.input.fullScale']);
    expect(bad(1e31)).toEqual(['out-of-range at arithmetic.input.fullScale']);
    expect(bad('4')).toEqual(['not-a-number at arithmetic.input.fullScale']);
    expect(problems(arithmetic({ output: { fullScale: [1, 1] } }, [two]))).toEqual([
      'full-scale-count at arithmetic.output.fullScale',
    ]);
  });
});

describe('write', () => {
  const write = (changes: Entry, title = 'Belt') => minimal({ title, write: changes });

  it('has a folder relative to the document', () => {
    for (const folder of ['.', 'generated', '../firmware/dsp', 'a/']) {
      expect(readClean(write({ folder })).write.folder).toBe(folder);
    }
    expect(problems(write({ folder: '' }))).toEqual(['empty-text at write.folder']);
    expect(problems(write({ folder: '/tmp' }))).toEqual(['path-absolute at write.folder']);
    expect(problems(write({ folder: 'D:\\out' }))).toEqual(['path-absolute at write.folder']);
    expect(problems(write({ folder: 'a\\b' }))).toEqual(['path-backslash at write.folder']);
    expect(problems(write({ folder: 'file:out' }))).toEqual(['path-scheme at write.folder']);
  });

  it('has a symbol, by default from the title', () => {
    expect(readClean(write({}, 'Checkweigher belt, 3rd')).write.symbol).toBe('checkweigher_belt_3rd');
    expect(readClean(write({ symbol: 'Belt_2' })).write.symbol).toBe('Belt_2');
    expect(problems(write({ symbol: '2belt' }))).toEqual(['symbol-form at write.symbol']);
    expect(problems(write({ symbol: 'struct' }))).toEqual(['symbol-keyword at write.symbol']);
    expect(problems(write({ symbol: '_Belt' }))).toEqual(['symbol-reserved at write.symbol']);
    expect(problems(write({ symbol: 'x'.repeat(64) }))).toEqual(['symbol-too-long at write.symbol']);
    expect(problems(write({ symbol: '' }))).toEqual(['empty-text at write.symbol']);
    expect(problems(write({ symbol: null }))).toEqual(['not-text at write.symbol']);
  });

  it('has languages, each once, in whatever order', () => {
    expect(readClean(write({ languages: ['npy', 'c'] })).write.languages).toEqual(['c', 'npy']);
    expect(readClean(write({ languages: ['csv', 'rs', 'npy', 'c'] })).write.languages).toHaveLength(4);
    expect(problems(write({ languages: [] }))).toEqual(['list-too-short at write.languages']);
    expect(problems(write({ languages: 'c' }))).toEqual(['not-a-list at write.languages']);
    expect(problems(write({ languages: ['c', 'go'] }))).toEqual(['not-one-of at write.languages.1']);
    expect(problems(write({ languages: ['c', 'rs', 'c'] }))).toEqual(['listed-twice at write.languages.2']);
  });

  it('has an order and test vectors', () => {
    expect(readClean(write({ order: 'oldest-first' })).write.order).toBe('oldest-first');
    expect(problems(write({ order: 'reversed' }))).toEqual(['not-one-of at write.order']);
    for (const testVectors of [0, 65_536])
      expect(readClean(write({ testVectors })).write.testVectors).toBe(testVectors);
    for (const testVectors of [-1, 65_537]) {
      expect(problems(write({ testVectors }))).toEqual(['out-of-range at write.testVectors']);
    }
  });
});

describe('attributes', () => {
  const attributes = (changes: Entry) => minimal({ write: { attributes: changes } });

  it.each([
    ['cBefore', '__attribute__((aligned(8)))'],
    ['cBefore', '_Alignas(16)'],
    ['cAfter', '__attribute__((section(".taps,"a"")))'.replaceAll('\\"', '')],
    ['rust', '#[link_section = ".taps"] #[used]'],
    ['rust', ''],
  ])('%s: %s', (key, value) => {
    expect(readClean(attributes({ [key]: value })).write.attributes).toMatchObject({ [key]: value });
  });

  it.each([
    ['cBefore', '= { 0 }; int x'],
    ['cBefore', '/* open'],
    ['cAfter', '// rest'],
    ['cAfter', 'a\\'],
    ['cAfter', 'a\n#define x'],
    ['cAfter', '((unbalanced)'],
    ['cAfter', '(crossed[)]'],
    ['cAfter', '"open'],
    ['cAfter', '??/'],
    ['cAfter', 'ü'],
    ['rust', 'link_section'],
    ['rust', '#[a] pub'],
    ['rust', '#[doc = "]"] x'],
  ])('%s refuses %j, which could be code', (key, value) => {
    expect(problems(attributes({ [key]: value }))).toEqual([`attribute-form at write.attributes.${key}`]);
  });
});

describe('shape', () => {
  const filter = (changes: Entry) => minimal({ filter: changes });

  it('has a symmetry and a fixed gain of the first input', () => {
    const { symmetry, fixedGain } = readClean(
      filter({ symmetry: 'even', fixedGain: { frequency: 0, gain: 1 } }),
    ).filter;
    expect(symmetry).toBe('even');
    expect(fixedGain).toEqual({ input: 1, frequency: 0, gain: 1 });
  });

  it('refuses what cannot be', () => {
    const gain = { frequency: 0, gain: 1 };
    expect(problems(filter({ symmetry: 'odd', fixedGain: gain }))).toEqual([
      'fixed-gain-odd at filter.fixedGain',
    ]);
    expect(problems(filter({ symmetry: 'odd', length: 1 }))).toEqual(['no-free-taps at filter.symmetry']);
    expect(problems(filter({ fixedGain: { ...gain, input: 2 } }))).toEqual([
      'fixed-gain-input at filter.fixedGain.input',
    ]);
    expect(problems(filter({ fixedGain: { gain: 1 } }))).toEqual([
      'missing-key at filter.fixedGain.frequency',
    ]);
  });
});

describe('limits', () => {
  it('are numbers or none', () => {
    expect(readClean(minimal({ limits: { heldOutNmse: -20.5, quantisationLoss: null } })).limits).toEqual({
      heldOutNmse: -20.5,
      quantisationLoss: null,
    });
    expect(problems(minimal({ limits: { heldOutNmse: '-20', quantisationLoss: true } }))).toEqual([
      'not-a-number at limits.heldOutNmse',
      'not-a-number at limits.quantisationLoss',
    ]);
  });
});

describe('every section', () => {
  it('is an object', () => {
    for (const key of ['prepare', 'filter', 'arithmetic', 'write', 'limits']) {
      for (const value of [null, [], 'x', 1])
        expect(problems(minimal({ [key]: value }))).toEqual([`not-an-object at ${key}`]);
    }
  });
});

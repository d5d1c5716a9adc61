import { describe, expect, it } from 'vitest';
import { readMark } from '../../../core/files/generatedMark';
import { finding } from '../../../core/findings/finding';
import { designNote } from '../../../core/note/designNote';
import type { DesignResult } from '../../../core/pipeline/designResult';
import { hostileNames } from '../../support/hostileNames';
import { type SampleOptions, sampleChoice, sampleResult } from '../../support/sampleResult';

const mark = { document: 'belt.pairing.json', digest: 'a'.repeat(64) };

function note(options: SampleOptions = {}, change: (result: DesignResult) => void = () => {}): string {
  const result = sampleResult(options);
  change(result);
  return designNote(result, mark, 'belt');
}

/** The text of one section. */
function sectionOf(text: string, title: string): string {
  const found = text.split(/^## /m).find((part) => part.startsWith(`${title}\n`));
  if (found === undefined) throw new Error(`no section ${title}`);
  return found;
}

describe('the design note', () => {
  it('carries the mark on its first line and every section of a review', () => {
    const text = note();
    expect(readMark(text)).toEqual(mark);
    expect(text.split('\n')[0]).toMatch(/^<!-- .* -->$/);
    expect([...text.matchAll(/^## (.*)$/gm)].map((match) => match[1])).toEqual([
      'Verdict',
      'Job and signals',
      'Recordings',
      'Suitability',
      'Length, delay, regularisation, windowing',
      'Result',
      'Pictures',
      'Number format and loss',
      'Cost',
      'What the firmware does around the filter',
      'Taps',
      'How to reproduce',
      'Cautions',
    ]);
  });

  it('holds the choices against others, and says what others would gain', () => {
    const text = sectionOf(
      note({}, (result) => {
        result.choice = sampleChoice();
      }),
      'Held against other values',
    );
    expect(text).toContain('each of 10 blocks was left out in turn, with 128 unused samples on either side');
    expect(text).toContain(
      '| length | 64 taps: -30.50 dB ± 0.21 | 48 taps: -24.25 dB | 80 taps: -30.52 dB | 80 taps: -30.52 dB |',
    );
    expect(text).toContain('| regularisation | 0.0001: -30.50 dB ± 0.21 | 1e-6: no solution | 1: -3.00 dB |');
    // 0.02 dB of 80 taps are not worth a word.
    expect(text).toContain('Of these values, each by itself, a delay of 1 would lower it by 0.75 dB.');
    expect(text).toContain('](belt.note/choice.svg)');
    const withheld = note({}, (result) => {
      result.choice = { withheld: 'Too short.' };
    });
    expect(sectionOf(withheld, 'Held against other values')).toContain('Not cross-validated: Too short.');
  });

  it('says that the wanted signal hides differences, and counts no nearer horizon as better', () => {
    const held = (change: (result: DesignResult) => void) =>
      sectionOf(
        note({}, (result) => {
          result.choice = sampleChoice();
          change(result);
        }),
        'Held against other values',
      );
    const hides = 'makes differences look smaller';
    const mark = (result: DesignResult, bare: boolean) => {
      for (const take of result.takes) take.disturbanceOnly = bare ? take.fit : [];
    };
    expect(held((result) => mark(result, false))).toContain(hides);
    expect(held((result) => mark(result, true))).not.toContain(hides);
    const predicted = held((result) => {
      result.document.job = 'predict';
    });
    expect(predicted).toContain('No other value on these lines lowers the error by more than 0.05 dB.');
    expect(predicted).not.toContain('a delay of 1 would');
  });

  it('says in the verdict whether limits are met', () => {
    expect(sectionOf(note(), 'Verdict')).toContain(
      '**All limits are met.** On 20,000 held-out, disturbance-only samples (10 s)',
    );
    const none = note({}, ({ document }) => {
      document.limits = { heldOutNmse: null, quantisationLoss: null };
    });
    expect(sectionOf(none, 'Verdict')).toContain('**No limits are set; judge the figures.**');
    const one = note({}, ({ document }) => {
      document.limits.quantisationLoss = null;
    });
    expect(sectionOf(one, 'Verdict')).toContain('**The limit that is set is met.**');
    expect(sectionOf(note({ heldOut: 'none' }), 'Verdict')).toContain(
      '**Not proved: no data are held out.**',
    );
    expect(sectionOf(note({ heldOut: 'all' }), 'Verdict')).toContain('**Not tested:');
  });

  it('puts what is over a limit before all other findings', () => {
    const text = sectionOf(
      note({}, (result) => {
        result.findings = [
          finding('overflow', { where: 'the output word', count: 2, samples: 20000, cure: '' }),
          finding('ill-conditioned', { condition: 1e12 }),
          finding(
            'over-limit',
            { what: 'the held-out NMSE', value: -12.3, limit: -20, where: '' },
            { path: ['limits', 'heldOutNmse'] },
          ),
        ];
      }),
      'Verdict',
    );
    expect(text).toContain('**Over a limit: these taps do not pass.**');
    expect(text).toMatch(/held-out NMSE \|.*\| exceeded \|/);
    const first = text.indexOf('is -12.3 dB when expected at most -20 dB');
    expect(first).toBeGreaterThan(0);
    expect(first).toBeLessThan(text.indexOf('overflowed at 2 of 20000 samples'));
  });

  it('carries the caution of a hidden disturbance wherever held-out figures are shown', () => {
    const text = note({ heldOut: 'all' });
    for (const title of ['Verdict', 'Result', 'Pictures', 'Number format and loss']) {
      expect(sectionOf(text, title), title).toMatch(/\*\*Caution:\*\* .*hides the disturbance/);
    }
    expect(note()).not.toMatch(/hides the disturbance/);
    expect(note({ job: 'equalise', heldOut: 'all' })).not.toMatch(/hides the disturbance/);
  });

  it('names the worst take, lists every take, and says which are left out', () => {
    const text = note({}, (result) => {
      const [take] = result.takes;
      result.takes = ['slow', 'fast', 'loaded'].map((label) => ({ ...take, name: label }));
      const figure = { samples: 10000, mse: 0.01, standardErrorDb: null };
      result.heldOut!.takes = [
        { ...figure, name: 'slow', nmseDb: -31 },
        { ...figure, name: 'fast', nmseDb: -25 },
      ];
    });
    expect(sectionOf(text, 'Verdict')).toContain('held-out NMSE, worst take (`fast`) | -25.00 dB |');
    const result = sectionOf(text, 'Result');
    expect(result).toContain('held out, take `slow` | 10,000 | 0.01 | -31.00 dB | – |');
    expect(result).toContain('Left out, since they have no such part: `loaded`.');
  });

  it('compares fit and held-out figures only where the wanted signal is in neither', () => {
    const title = 'Length, delay, regularisation, windowing';
    expect(sectionOf(note(), title)).toContain('Fit and held-out NMSE are not comparable here');
    const bare = note({}, (result) => {
      result.takes[0].disturbanceOnly = [
        { from: 0, to: 80000 },
        { from: 100000, to: 120000 },
      ];
    });
    expect(sectionOf(bare, title)).toContain('Held-out NMSE minus fit NMSE is 0.37 dB');
    expect(sectionOf(bare, 'Result')).not.toContain('with the wanted signal where it is present');
  });

  it('shows cost and room against overflow', () => {
    const text = note({ delay: 5 });
    expect(sectionOf(text, 'Cost')).toContain('| 128 a sample, 0.256 million a second (16-bit × 16-bit) |');
    expect(sectionOf(text, 'Cost')).toContain('| coefficients | 256 bytes |');
    expect(sectionOf(text, 'Cost')).toContain('| delay of the desired signal, 5 samples | 10 bytes |');
    expect(sectionOf(text, 'Number format and loss')).toContain('40 bits: cannot overflow, 6 bits to spare');
    const narrow = sectionOf(note({ accumulator: 28 }), 'Number format and loss');
    expect(narrow).toMatch(/28 bits: can overflow by [1-9] bits, then additions wrap/);
  });

  it('states the cautions of the house for every job', () => {
    for (const job of ['cancel', 'identify', 'equalise', 'predict'] as const) {
      const text = sectionOf(note({ job, heldOut: 'all' }), 'Cautions');
      expect(text).toContain('holds for the conditions recorded');
      expect(text).toContain('can make the loop unstable');
      expect(text).toContain('can be loud');
      expect(text).toMatch(
        /safety function, a medical device or a hearing device: the applicable standards, local codes and a licensed engineer decide/,
      );
    }
  });

  it('says how to reproduce it, with a shell word that holds any name', () => {
    expect(sectionOf(note(), 'How to reproduce')).toContain(
      'tapwright design belt.pairing.json\ntapwright check belt.pairing.json',
    );
    const odd = sectionOf(note({ documentFile: "it's $(x).pairing.json" }), 'How to reproduce');
    expect(odd).toContain("tapwright check 'it'\\''s $(x).pairing.json'");
    expect(sectionOf(note(), 'How to reproduce')).toContain(sampleResult().recordings[0].sha256);
  });

  it.each(hostileNames)('keeps its shape with every name being %j', (hostile) => {
    const names = { title: hostile, file: hostile, take: hostile, inputs: [hostile, 'b'], desired: hostile };
    const text = note({ ...names, heldOut: 'all' });
    const calm = note({ heldOut: 'all' });
    const shape = (of: string) =>
      of.split('\n').map((line) => (line.startsWith('|') ? line.match(/\|/g)?.length : line[0]));
    expect(shape(text)).toEqual(shape(calm));
    const outsideCode = text
      .split('\n')
      .slice(1)
      .join('\n')
      .replace(/```sh[\s\S]*?```/, '')
      .replace(/`[^`\n]*`/g, '');
    expect(outsideCode).not.toMatch(/<|javascript:|\]\(http/);
  });
});

describe('what the firmware does around the filter', () => {
  const steps = (options: SampleOptions) =>
    sectionOf(note(options), 'What the firmware does around the filter');

  it('cancel: takes the input means off, delays the desired signal, leaves its mean in it', () => {
    const text = steps({ delay: 5 });
    expect(text).toContain('`frame_x`: 2048 counts; `frame_z`: -2048 counts');
    expect(text).toContain('Leave the mean of the desired signal `cell` in it');
    expect(text).toContain(
      'Delay the desired signal `cell` by 5 samples (2.5 ms), then subtract: `e[n] = d[n - 5] - y[n]`',
    );
    expect(text).toContain('512 a unit, full scale 64');
    expect(text).toContain('`y = floor((acc + 2^14) / 2^15)`');
    expect(text).toContain('do not use the first 63 outputs');
  });

  it('identify with a pure lag: delays the input, adds the desired mean', () => {
    const text = steps({ job: 'identify', delay: -7, inputs: ['drive'], desired: 'flow' });
    expect(text).toContain(
      "Delay the input by 7 samples (3.5 ms) before the filter (the design's delay is `-7`)",
    );
    expect(text).toContain('Add 6400 counts, the mean of the desired signal `flow`, to y');
    expect(text).toContain("model's estimate of `d[n]`");
    expect(text).toContain('do not use the first 70 outputs');
  });

  it('equalise: says how late the restored signal comes', () => {
    expect(steps({ job: 'equalise', delay: 12 })).toContain(
      'it comes 12 samples (6 ms) after the signal it restores',
    );
  });

  it('predict: names the horizon and delays nothing', () => {
    const text = steps({ job: 'predict', delay: -8, inputs: ['level'], desired: 'level' });
    expect(text).toContain(
      'forecast of `d[n + 8]`, d being `level`, 8 samples (4 ms) ahead of the newest input sample',
    );
    expect(text).toContain('Nothing is delayed.');
    expect(text).not.toContain('Delay the input');
  });

  it('without mean removal takes nothing off and adds nothing', () => {
    const text = steps({ job: 'identify', removeMean: false });
    expect(text).toContain('Take no mean off the inputs');
    expect(text).not.toContain('mean of the desired signal');
  });

  it('says what the accumulator and the output do where they can overflow', () => {
    const text = steps({
      accumulator: 28,
      accumulatorOverflow: 'saturate',
      overflow: 'wrap',
      outputWord: 12,
    });
    expect(text).toContain('so it can overflow: every addition stops at the limits of 28 bits');
    expect(text).toContain('Keep the low 12 bits of y');
    expect(steps({ accumulator: 28 })).toContain('every addition wraps modulo `2^28`');
  });

  it("in floats speaks of the recording's units and of the order of the sum", () => {
    const text = steps({ word: 'float32' });
    expect(text).toContain('in float32, every product and every sum rounded');
    expect(text).not.toMatch(/counts|accumulator/);
  });
});

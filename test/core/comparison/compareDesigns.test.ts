import { describe, expect, it } from 'vitest';
import { changeInWords } from '../../../core/comparison/changeInWords';
import { compareDesigns } from '../../../core/comparison/compareDesigns';
import { frequencyResponse } from '../../../core/figures/frequencyResponse';
import { designFiles } from '../../../core/files/designFiles';
import type { DesignResult } from '../../../core/pipeline/designResult';
import { nodeSha256 } from '../../support/nodeSha256';
import { type SampleOptions, sampleResult } from '../../support/sampleResult';

/** The taps file that a result would be written to. */
function written(result: DesignResult): string {
  const files = designFiles(result, nodeSha256);
  return new TextDecoder().decode(files[files.length - 1].bytes);
}

const compare = (before: DesignResult, after: DesignResult) =>
  compareDesigns(written(before), 'belt.taps.json', after);

/** A result with other taps, its integers left as they are. */
function changed(options: SampleOptions, change: (taps: Float64Array[]) => void): DesignResult {
  const result = sampleResult(options);
  result.coefficients = result.coefficients.map((row) => row.slice());
  change(result.coefficients);
  return result;
}

describe('compareDesigns', () => {
  it('finds no change between a design and itself', () => {
    expect(compare(sampleResult(), sampleResult())).toBeNull();
  });

  it('names the tap that changes most, and the size of the change over all taps', () => {
    const before = sampleResult();
    const after = changed({}, (taps) => {
      taps[1][9] += 0.25;
      taps[0][3] -= 0.125;
    });
    const change = compare(before, after);
    const w = before.coefficients[1][9];
    expect(change?.largest).toEqual({ input: 'frame_z', k: 9, before: w, after: w + 0.25 });
    const size = Math.hypot(...before.coefficients.flatMap((row) => [...row]));
    expect(change?.relative).toBeCloseTo(Math.hypot(0.25, 0.125) / size, 12);
    expect(change?.values).toEqual({ different: 0, of: 128 });
  });

  it('compares the responses: one tap more of 0.25 is 0.25 at every frequency', () => {
    const before = sampleResult({ inputs: ['a'] });
    const after = changed({ inputs: ['a'] }, ([taps]) => {
      taps[0] += 0.25;
    });
    const change = compare(before, after);
    const { real, imaginary } = frequencyResponse(before.coefficients[0], 513);
    const peak = Math.max(...real.map((re, i) => Math.hypot(re, imaginary[i])));
    expect(change?.response.differenceDb).toBeCloseTo(20 * Math.log10(0.25 / peak), 9);
    const now = frequencyResponse(after.coefficients[0], 513);
    let most = 0;
    let at = 0;
    real.forEach((re, i) => {
      const then = Math.hypot(re, imaginary[i]);
      const ratio = 20 * Math.log10(Math.hypot(now.real[i], now.imaginary[i]) / then);
      if (then >= 0.1 * peak && Math.abs(ratio) > Math.abs(most)) [most, at] = [ratio, (i * 1000) / 512];
    });
    expect(change?.response.magnitudeDb).toBeCloseTo(most, 9);
    expect(change?.response.magnitudeAt).toBe(at);
  });

  it('compares taps where they meet the same sample: a larger delay with the taps moved along is no change of them', () => {
    const before = sampleResult({ inputs: ['a'], length: 64, delay: 0 });
    const after = changed({ inputs: ['a'], length: 69, delay: 5 }, ([taps]) => {
      taps.fill(0);
      taps.set(before.coefficients[0], 5);
    });
    const change = compare(before, after);
    expect(change).toMatchObject({
      relative: 0,
      delay: { before: 0, after: 5 },
      length: { before: 64, after: 69 },
      values: null,
    });
    expect(change?.response.magnitudeDb).toBeCloseTo(0, 9);
    const words = changeInWords(change ?? never());
    expect(words[0]).toBe('length 64 to 69; delay 0 to 5; the taps are the same');
  });

  it('compares a shorter filter with zeros for the taps that it has lost', () => {
    const before = sampleResult({ inputs: ['a'], length: 64 });
    const after = changed({ inputs: ['a'], length: 40 }, ([taps]) => {
      taps.set(before.coefficients[0].subarray(0, 40));
    });
    const lost = before.coefficients[0].subarray(40);
    const change = compare(before, after);
    expect(change?.relative).toBeCloseTo(Math.hypot(...lost) / Math.hypot(...before.coefficients[0]), 12);
    expect(change?.largest).toMatchObject({ after: 0 });
    expect(change?.largest.k).toBeGreaterThanOrEqual(40);
  });

  it('puts filters that are far apart beside each other without room for the gap', () => {
    const before = sampleResult({ inputs: ['a'], delay: 0 });
    const after = sampleResult({ inputs: ['a'], delay: -1e9 });
    expect(compare(before, after)?.relative).toBeCloseTo(Math.SQRT2, 12);
  });

  it('counts integers that differ though the taps do not, and says what else changed', () => {
    const after = sampleResult();
    after.arithmetic.values = after.arithmetic.values.map((row) => row.map((v, k) => (k < 3 ? v + 1 : v)));
    after.documentSha256 = 'e'.repeat(64);
    after.recordings[0].sha256 = 'f'.repeat(64);
    const change = compare(sampleResult(), after);
    expect(change).toMatchObject({
      relative: 0,
      values: { different: 6, of: 128 },
      documentChanged: true,
      recordingsChanged: ['slow.csv'],
    });
    expect(changeInWords(change ?? never())).toEqual([
      'the taps are the same; 6 of 128 written values differ',
      'response the same; held out -30.83 dB to -30.83 dB; in the target -30.82 dB to -30.82 dB',
    ]);
  });

  it('says nothing of a file that it cannot read, or of other inputs', () => {
    expect(compareDesigns('{', 'x', sampleResult())).toBeNull();
    expect(compareDesigns('{ "taps": 2 }', 'x', sampleResult())).toBeNull();
    expect(compare(sampleResult({ inputs: ['a'] }), sampleResult())).toBeNull();
  });

  it('puts the change in words', () => {
    const after = changed({}, (taps) => {
      taps[0][4] = 9.5;
    });
    after.heldOut = { ...(after.heldOut ?? never()), nmseDb: -31.5 };
    const [taps, effect] = changeInWords(compare(sampleResult(), after) ?? never());
    expect(taps).toMatch(
      /^taps by -\d+\.\d\d dB of their size, most w\[4\] of frame_x: 9 to 9\.5; 0 of 128 written values differ$/,
    );
    expect(effect).toMatch(
      /^response by at most -?\d\.\d\d dB at [\d.]+ k?Hz; held out -30\.83 dB to -31\.50 dB; in the target -30\.82 dB to -30\.82 dB$/,
    );
  });
});

function never(): never {
  throw new Error('nothing there');
}

import { describe, expect, it } from 'vitest';
import { decibelError, responseWithErrors } from '../../../core/figures/responseErrors';
import { confidenceJson, residualsJson } from '../../../core/files/confidenceJson';
import { designNote } from '../../../core/note/designNote';
import { impulsePicture } from '../../../core/note/pictures/impulse';
import { magnitudePicture } from '../../../core/note/pictures/magnitude';
import type { DesignResult } from '../../../core/pipeline/designResult';
import { seededNormal } from '../../support/random';
import { sampleResult } from '../../support/sampleResult';

const mark = { document: 'belt.pairing.json', digest: 'a'.repeat(64) };
const note = (result: DesignResult) => designNote(result, mark, 'belt');

function withheld(): DesignResult {
  const result = sampleResult();
  result.confidence.errors = { withheld: 'too-many-taps' };
  result.confidence.residuals.extra = null;
  result.confidence.residuals.whiteness = null;
  return result;
}

describe('errors of magnitude and phase', () => {
  it('are the spread of a response whose parts are drawn at random (delta method against 4,000 draws)', () => {
    // One tap: the response is that tap at every frequency, here 2 with independent and then with tied parts.
    for (const [real, imaginary, both] of [
      [0.01, 0.02, 0],
      [0.01, 0.02, 0.012],
    ]) {
      const row = (value: number) => Float64Array.of(value, value);
      const got = responseWithErrors([2], { real: row(real), imaginary: row(imaginary), both: row(both) });
      const normal = seededNormal(5);
      let size = 0;
      let turn = 0;
      const draws = 4000;
      for (let i = 0; i < draws; i++) {
        const a = normal();
        const b = normal();
        const re = 2 + Math.sqrt(real) * a;
        const im = (both / Math.sqrt(real)) * a + Math.sqrt(imaginary - both ** 2 / real) * b;
        size += (Math.hypot(re, im) - 2) ** 2;
        turn += Math.atan2(im, re) ** 2;
      }
      expect(got.magnitude[0]).toBe(2);
      expect(got.magnitudeError[0] / Math.sqrt(size / draws)).toBeCloseTo(1, 1);
      expect(got.phaseError[0] / Math.sqrt(turn / draws)).toBeCloseTo(1, 1);
    }
  });

  it('know nothing of a magnitude that cannot be told from zero', () => {
    expect(decibelError(1, 0.1)).toBeCloseTo(20 * Math.log10(1.1), 1);
    expect(decibelError(1, 0.6)).toBeNull();
    expect(decibelError(0, 0)).toBeNull();
  });
});

describe('the taps file', () => {
  it('has the standard errors, the taps that cannot be told from zero, and the errors of the response', () => {
    const result = sampleResult();
    result.coefficients[0][1] = 0.0058;
    result.coefficients[0][2] = 0.0059;
    result.coefficients[0][3] = -0.001;
    const json = confidenceJson(result) as Record<string, never>;
    expect(json.lagWindow).toBe(1024);
    expect((json.standardErrors as number[][]).map((row) => row[0])).toEqual([0.003, 0.006]);
    // 95 %: 1.96 · 0.003 = 0.00588.
    const untold = (json.notToldFromZero as number[][])[0];
    expect(untold).toContain(1);
    expect(untold).not.toContain(2);
    expect(untold).toContain(3);
    const [response] = json.response as {
      points: number;
      magnitudeErrorDb: number[];
      phaseErrorDegrees: number[];
    }[];
    expect(response.magnitudeErrorDb).toHaveLength(response.points);
    expect(response.phaseErrorDegrees).toHaveLength(response.points);
  });

  it('has the tests of the residual and how the error is spread over frequency', () => {
    const json = residualsJson(sampleResult()) as Record<string, never>;
    expect(json).toMatchObject({
      samples: 79937,
      ljungBox: { lags: 20, degreesOfFreedom: 20, probability: 0 },
      crossCorrelation: [
        { input: 'frame_x', before: { lags: 32, probability: 0.42, gainDb: 0 }, after: { lags: 32 } },
        { input: 'frame_z' },
      ],
    });
    expect(json.autocorrelation).toHaveLength(21);
    const shares = (json.bands as { shareDb: number }[]).map(({ shareDb }) => 10 ** (shareDb / 10));
    expect(shares.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 2);
  });

  it('says why there are none', () => {
    expect(confidenceJson(withheld())).toEqual({ withheld: 'too-many-taps' });
    expect(residualsJson(withheld())).toMatchObject({
      ljungBox: null,
      crossCorrelation: [{ before: null, after: null }, {}],
    });
  });
});

describe('the note', () => {
  it('marks taps that cannot be told from zero, and counts them', () => {
    const result = sampleResult({ length: 4 });
    result.coefficients = [Float64Array.of(1, 0.005, -0.5, 0.001), Float64Array.of(1, 1, 1, 0.01)];
    const text = note(result);
    expect(text).toContain('3 taps of 8 cannot be told from zero (95 %), marked †');
    expect(text).toMatch(/\| 1 \| 0\.5 ms \| 0\.005 † \| 0\.003 \|/);
    expect(text).toMatch(/\| 0 \| 0 s \| 1 \| 0\.003 \|/);
    expect(note(withheld())).toContain(
      'Standard errors of the taps are not given: there are more than 2048 taps',
    );
    expect(note(withheld())).not.toMatch(/\| standard error \| c\[k\]/);
  });

  it('has a table of the residual tests', () => {
    const text = note(sampleResult());
    expect(text).toContain(
      '| residual against input `frame_x`, lags 64 to 95, beyond the last tap | 0 (95 % of single lags within ±0.0081) | taps there would gain 0.00 dB | 0.42 |',
    );
    expect(text).toContain('Q = 15,600 with 20 degrees of freedom | below 1e-6 |');
    expect(note(sampleResult({ job: 'predict' }))).not.toContain('before the first tap |');
    expect(note(withheld())).toContain('Lags beside the filter were not tested');
  });
});

describe('the pictures', () => {
  it('have a filled band around each magnitude and a bar around each tap', () => {
    const bands = (result: DesignResult) =>
      magnitudePicture(result, '<!-- -->').match(/fill-opacity="0.18"/g);
    expect(bands(sampleResult())).toHaveLength(2);
    expect(bands(withheld())).toBeNull();
    const bars = /<path d="((?:M[\d.]+,[\d.]+V[\d.]+)+)" fill="none" stroke="#57606a"/;
    expect(bars.exec(impulsePicture(sampleResult(), ''))?.[1].match(/M/g)).toHaveLength(64);
    expect(bars.test(impulsePicture(withheld(), ''))).toBe(false);
    expect(bars.test(impulsePicture(sampleResult({ length: 500 }), ''))).toBe(false);
  });
});

import { describe, expect, it } from 'vitest';
import { limitDiffers } from '../../../core/pipeline/comparableLimit';
import type { DesignResult } from '../../../core/pipeline/designResult';
import { sampleResult } from '../../support/sampleResult';

function differs(change: (result: DesignResult) => void) {
  const result = sampleResult();
  change(result);
  return limitDiffers(result);
}

describe('the limit by the coherence of the fit data', () => {
  it('is no measure of held-out data without the wanted signal, unless some of the fit is without it too', () => {
    const mark = (result: DesignResult, bare: boolean) => {
      for (const take of result.takes)
        take.disturbanceOnly = bare ? [...take.fit, ...take.heldOut] : take.heldOut;
    };
    expect(differs((result) => mark(result, false))).toBe('wanted signal');
    expect(differs((result) => mark(result, true))).toBeNull();
    expect(
      differs((result) => {
        mark(result, false);
        result.document.job = 'identify';
      }),
    ).toBeNull();
  });

  it('is none of an error weighted to a band', () => {
    expect(
      differs(({ document }) => {
        document.job = 'identify';
        document.prepare.band = { from: 100, to: 200 };
      }),
    ).toBe('band');
  });
});

import type { ExtraLags } from '../confidence/extraLags';
import { gainDb } from '../confidence/residualFindings';
import { decibels } from '../figures/decibels';
import { counted, grouped, noFigure, significant } from '../figures/numbers';
import type { DesignResult } from '../pipeline/designResult';
import { name, table } from './markdown';

/** Whether anything is left in the residual of the fit, as paragraphs and tables. */
export function residualTests(result: DesignResult): string[] {
  const { residuals } = result.confidence;
  const { samples, fit } = { samples: residuals.samples, fit: result.fit.samples };
  const over = samples < fit ? `${grouped(samples)} samples spread over the fit` : 'the samples of the fit';
  return [
    `Is anything left in the residual of the fit? Tests over ${over}; a probability is that of so much or more by chance where nothing is left.`,
    table(['test', 'expected', 'found', 'probability'], residualRows(result, name), ['probability']),
    remark(result),
  ];
}

/**
 * Each test with what is expected, what was found and the probability.
 * @param show how the name of an input is written
 */
export function residualRows(result: DesignResult, show: (label: string) => string): string[][] {
  return [whiteness(result), ...inputs(result, show)];
}

function whiteness({ confidence, document }: DesignResult): string[] {
  const { whiteness: test, autocorrelation, bound } = confidence.residuals;
  const largest = autocorrelation
    .subarray(1)
    .reduce((most, value) => (Math.abs(value) > Math.abs(most) ? value : most), 0);
  const found = `largest coefficient ${significant(largest, 2)} (95 % of white noise within ±${significant(bound, 2)})`;
  const expected =
    document.job === 'predict'
      ? 'white: nothing more to predict from the same past'
      : 'white only if the noise is';
  if (test === null) return ['autocorrelation of the residual', expected, found, noFigure];
  return [
    `autocorrelation of the residual, lags 1 to ${test.lags} (Ljung–Box)`,
    expected,
    `${found}; Q = ${significant(test.statistic, 4)} with ${counted(test.degreesOfFreedom, 'degree')} of freedom`,
    probability(test.probability),
  ];
}

function inputs(result: DesignResult, show: (label: string) => string): string[][] {
  const { residuals } = result.confidence;
  const shaped = result.shape !== null || result.document.prepare.band !== null;
  return residuals.inputs.flatMap(({ inside, fromRegularisation, bound }, r) => {
    const label = result.inputs.length === 1 ? 'the input' : `input ${show(result.inputs[r])}`;
    const within = [
      `residual against ${label}, inside the filter`,
      shaped
        ? 'what the shape or the band asked for leaves'
        : `0, and ${significant(fromRegularisation, 2)} by regularisation (orthogonality)`,
      `largest coefficient ${significant(inside, 2)}`,
      noFigure,
    ];
    const sides = (residuals.extra ?? []).filter(({ input }) => input === r);
    return [
      within,
      ...sides.map((of) => [
        `residual against ${label}, ${sideInWords(of, result)}`,
        `0 (95 % of single lags within ±${significant(bound, 2)})`,
        `taps there would gain ${decibels(gainDb(of))}`,
        probability(of.probability),
      ]),
    ];
  });
}

function sideInWords({ side, lags }: ExtraLags, { document }: DesignResult): string {
  const { length } = document.filter;
  return side === 'after'
    ? `lags ${length} to ${length + lags - 1}, beyond the last tap`
    : `lags -${lags} to -1, before the first tap`;
}

function probability(value: number): string {
  return value < 1e-6 ? 'below 1e-6' : significant(value, 2);
}

function remark({ confidence }: DesignResult): string {
  return confidence.residuals.extra === null
    ? 'Lags beside the filter were not tested: there are too few samples for them.'
    : 'A low probability beyond the last tap asks for more taps, one before the first for a larger delay, where the gain is worth it.';
}

import { firmwareSteps } from '../../files/firmwareSteps';
import type { DesignResult } from '../../pipeline/designResult';
import { code, name, section, steps } from '../markdown';

/** What the firmware does around the filter, step by step. */
export function firmware(result: DesignResult): string {
  const { symbol, languages, testVectors } = result.document.write;
  const vectors =
    languages.includes('c') && testVectors > 0
      ? `${code(`${symbol}_vectors.h`)} holds x and y of the filter itself for a unit test: it starts after the means are off and ends before anything is added to y.`
      : '';
  return section(
    'What the firmware does around the filter',
    'At every sample n:',
    steps(firmwareSteps(result, { name, formula: code })),
    vectors,
  );
}

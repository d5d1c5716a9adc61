import { roundedDecibels } from '../figures/decibels';
import type { ChoiceLine } from '../pipeline/choiceLines';
import type { DesignResult } from '../pipeline/designResult';
import type { Json } from './jsonText';

/** The document's length, delay and regularisation held against others; `{ withheld }` says why there is nothing. */
export function choiceLinesJson(choice: DesignResult['choice']): Json {
  if (choice === null) return null;
  if ('withheld' in choice) return { withheld: choice.withheld };
  return {
    validation: { ...choice.validation },
    length: line(choice.length),
    delay: line(choice.delay),
    regularisation: line(choice.regularisation),
  };
}

function line({ values, crossDb, errorDb, fitDb }: ChoiceLine): Json {
  const row = (decibels: Float64Array) => Array.from(decibels, (value) => roundedDecibels(value));
  return {
    values: [...values],
    nmseDb: row(crossDb),
    standardErrorDb: row(errorDb),
    fitNmseDb: row(fitDb),
  };
}

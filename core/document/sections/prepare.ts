import { orNull } from '../checks/check';
import { type Keys, objectOf } from '../checks/keys';
import { numberIn } from '../checks/numbers';
import { trueOrFalse } from '../checks/texts';
import type { PairingDocument } from '../pairingDocument';
import { rising } from './intervals';

/** What is done to the signals before the fit. */
export function prepare(keys: Keys): PairingDocument['prepare'] {
  return {
    removeMean: keys.optional('removeMean', trueOrFalse, true),
    band: keys.optional('band', orNull(band), null),
  };
}

/** No rate of a converter comes near. */
export const highestRate = 1e12;

const band = objectOf((keys) => {
  const from = keys.required('from', numberIn(0, highestRate));
  const to = keys.required('to', numberIn(0, highestRate));
  if (from === undefined || to === undefined) return undefined;
  return rising(from, to, 'Hz', keys.at) ? { from, to } : undefined;
});

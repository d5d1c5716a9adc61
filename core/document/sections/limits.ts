import { orNull } from '../checks/check';
import type { Keys } from '../checks/keys';
import { anyNumber } from '../checks/numbers';
import type { PairingDocument } from '../pairingDocument';

/** What the result may not exceed, in dB; null where it may. */
export function limits(keys: Keys): PairingDocument['limits'] {
  return {
    heldOutNmse: keys.optional('heldOutNmse', orNull(anyNumber), null),
    quantisationLoss: keys.optional('quantisationLoss', orNull(anyNumber), null),
  };
}

import type { PairingDocument, Word } from '../document/pairingDocument';

/** Words in which the firmware's filter computes: where the coefficients are floats, everything is of their type. */
export function signalWords({ arithmetic }: PairingDocument): { input: Word; output: Word } {
  const { word, input, output } = arithmetic;
  return typeof word === 'number'
    ? { input: input.word, output: output.word }
    : { input: word, output: word };
}

import type { FuzzInput, ReaderName } from './makeInput';
import { readRecording } from './readers/recording';
import { readMarked, readPairing, readTapsFile } from './readers/texts';

const readers: Record<ReaderName, (input: FuzzInput) => Promise<string[]>> = {
  recording: readRecording,
  document: readPairing,
  taps: readTapsFile,
  mark: readMarked,
};

/**
 * Gives an input to its reader and holds what comes back to the contract.
 * @returns codes of the findings, and `opened`, `read` or `mark` where the input was accepted
 * @throws what is wrong
 */
export function tryInput(input: FuzzInput): Promise<string[]> {
  return readers[input.reader](input);
}

import { table } from './sentence';

/** Findings about delimited text files, and about files that are no recordings at all. */
export const textSentences = table({
  'empty-file': {
    severity: 'blocker',
    says: 'the file has no bytes; expected a recording.',
  },
  'lfs-pointer': {
    severity: 'blocker',
    says: 'this is a Git LFS pointer and not the recording it stands for. Fetch it with "git lfs pull".',
  },
  'not-a-recording': {
    severity: 'blocker',
    says: 'got {what} when expected WAV, NPY or rows of numbers separated by commas, semicolons, tabs or spaces.',
  },
  'not-a-number-cell': {
    severity: 'blocker',
    says: 'column {column}: got "{cell}" when expected a number. Mend the cell, or leave it empty and leave the stretch out of the intervals.',
  },
  'ragged-row': {
    severity: 'blocker',
    says: 'got {got} cells when expected {expected}, as many as the rows before have. Mend the row or export the file again.',
  },
  'line-too-long': {
    severity: 'blocker',
    says: 'got a line of more than {limit} bytes; expected rows of numbers.',
  },
  'taken-as-time': {
    severity: 'note',
    says: 'the first column has no name and rises by even steps, so that it is taken for the time in seconds: {rate} Hz. Give it another name where it is a signal.',
  },
  'uneven-time': {
    severity: 'caution',
    says: 'the time column is not uniform: {what}. {cure}',
  },
});

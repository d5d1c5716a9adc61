import { table } from './sentence';

/** Findings about files that were written earlier or are to be written. */
export const checkSentences = table({
  'foreign-file': {
    severity: 'blocker',
    says: 'the file is there and does not carry the mark of a generated file, so it is left as it is. Move it away or choose another folder or symbol.',
  },
  'not-writable': {
    severity: 'blocker',
    says: 'the file could not be written ({error}); nothing was changed, or the set shows as stale. Check space and permissions.',
  },
  'not-written': {
    severity: 'blocker',
    says: 'the files of this pairing were never written, or {file} is gone. Write the files.',
  },
  'not-taps': {
    severity: 'blocker',
    says: 'this is not a taps file that this version can read: {why}. Expected a file written by "tapwright design".',
  },
  'stale-document': {
    severity: 'blocker',
    says: 'the document has changed since the files were written. Write the files again.',
  },
  'stale-recording': {
    severity: 'blocker',
    says: 'the recording is not the one that the files were made from. Bring it back, or write the files again.',
  },
  edited: {
    severity: 'blocker',
    says: 'the file is not as it was written: edited by hand, or from another run. Write the files again.',
  },
  'missing-output': {
    severity: 'blocker',
    says: 'the file was written with the others and is gone. Write the files.',
  },
  different: {
    severity: 'blocker',
    says: 'solving again changes {what}: got {got} when expected {expected}. Write the files again.',
  },
  'inputs-differ': {
    severity: 'blocker',
    says: 'got {got} input channels when expected {expected}, as many as the taps file has rows. Name them with --input.',
  },
});

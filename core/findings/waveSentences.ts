import { table } from './sentence';

/** Findings about WAV and NPY files. */
export const waveSentences = table({
  'unreadable-header': {
    severity: 'blocker',
    says: 'the header cannot be read: got {what} when expected {expected}. The file may be cut off or damaged; copy or export it again.',
  },
  'unsupported-codec': {
    severity: 'blocker',
    says: 'got {what} when expected PCM of 8, 16, 24 or 32 bits, float of 32 or 64 bits, A-law or µ-law. Convert the file to one of them.',
  },
  'unsupported-dtype': {
    severity: 'blocker',
    says: 'got {what} when expected a one- or two-dimensional array of f4, f8, i1, i2, i4, u1, u2 or u4. Save it with one of these types.',
  },
  truncated: {
    severity: 'caution',
    says: 'the header declares {declared} bytes of samples and the file has only {there}; what is there is used. Check that the file was copied whole.',
  },
  'open-data': {
    severity: 'note',
    says: 'the header leaves the size of the samples open (it says {declared}), as writers to a pipe do; all {there} bytes to the end of the file are taken for samples.',
  },
  'partial-frame': {
    severity: 'note',
    says: 'the last {bytes} bytes are no whole frame of {frame} bytes and are left out.',
  },
  'too-short': {
    severity: 'blocker',
    says: 'got {samples} samples when expected 2 or more.',
  },
  'file-changed': {
    severity: 'blocker',
    says: 'the file changed while it was read. Wait until its writer is done and start again.',
  },
});

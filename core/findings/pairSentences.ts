import { table } from './sentence';

/** Findings about how the document and the recordings go together. */
export const pairSentences = table({
  'outside-root': {
    severity: 'blocker',
    says: 'the path leads out of the folder that holds the project; expected a file inside it. Move the recording or name a wider folder with --root.',
  },
  'missing-file': {
    severity: 'blocker',
    says: 'no such file; expected the recording at this path, relative to the document.',
  },
  'not-a-file': {
    severity: 'blocker',
    says: 'this is a folder or a device when expected a file.',
  },
  'unreadable-file': {
    severity: 'blocker',
    says: 'the file is there but cannot be read; check its permissions.',
  },
  'file-too-large': {
    severity: 'blocker',
    says: 'the file is larger than 64 MiB, and files are read whole here. Use the desktop, or the command line, which read any size by parts; or cut the recording.',
  },
  'rate-differs': {
    severity: 'blocker',
    says: 'got {rate} samples a second when expected {expected}, the rate of {other}. Record with one clock or bring the files to one rate first.',
  },
  'rate-missing': {
    severity: 'blocker',
    says: 'the file does not say how many samples a second it has; expected "sampleRate" (in Hz) in the document.',
  },
  'channel-missing': {
    severity: 'blocker',
    says: 'got channel "{channel}" when expected one of its {count}: {known} (by name, or by number from 1).',
  },
  'length-differs': {
    severity: 'caution',
    says: 'the file has {samples} samples, and only the first {common} exist in all files of the take. Check that the recordings began together.',
  },
  'interval-past-end': {
    severity: 'blocker',
    says: 'the interval ends at sample {to}, but the recordings of the take have only {samples} ({seconds} s). Shorten it.',
  },
  'interval-overlap': {
    severity: 'blocker',
    says: 'samples {from} to {to} stand in two intervals; fit and held-out must not share samples, or the result proves nothing. Move one of them.',
  },
  'interval-empty': {
    severity: 'blocker',
    says: 'the interval holds no sample: it goes from sample {from} to sample {to}. Expected an end after its start.',
  },
  'no-fit-interval': {
    severity: 'blocker',
    says: 'no sample is left to fit the filter on; expected at least one fit interval.',
  },
  'missing-document': {
    severity: 'blocker',
    says: 'no such file; expected a pairing document.',
  },
  'not-a-document': {
    severity: 'blocker',
    says: 'this is no text; expected a pairing document (NAME.pairing.json). "tapwright inspect" shows recordings, "tapwright pair" makes a document of them.',
  },
  'document-exists': {
    severity: 'blocker',
    says: 'the document is there already and is left as it is. Name another with -o.',
  },
});

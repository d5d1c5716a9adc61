import { table } from './sentence';

/** Findings about the pairing document and what it names. */
export const documentSentences = table({
  'unknown-key': {
    severity: 'note',
    says: 'the key "{key}" is not known and changes nothing; check its spelling against the schema.',
  },
});

import type { Job } from '../document/pairingDocument';

/** The field's term for each job. */
export const jobWords: Record<Job, string> = {
  cancel: 'noise cancelling',
  identify: 'system identification',
  equalise: 'equalisation',
  predict: 'linear prediction',
};

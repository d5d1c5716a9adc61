import { checkSentences } from './checkSentences';
import { designSentences } from './designSentences';
import { documentSentences } from './documentSentences';
import { pairSentences } from './pairSentences';
import { recordingSentences } from './recordingSentences';

/** The one table that turns a code into its usual severity and its sentence; values stand in braces. */
export const sentences = {
  ...recordingSentences,
  ...documentSentences,
  ...pairSentences,
  ...designSentences,
  ...checkSentences,
} as const;

export type FindingCode = keyof typeof sentences;

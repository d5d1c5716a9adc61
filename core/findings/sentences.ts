import { checkSentences } from './checkSentences';
import { designSentences } from './designSentences';
import { documentSentences } from './documentSentences';
import { pairSentences } from './pairSentences';
import { recordingSentences } from './recordingSentences';
import { textSentences } from './textSentences';
import { waveSentences } from './waveSentences';

/** The one table that turns a code into its usual severity and its sentence; values stand in braces. */
export const sentences = {
  ...recordingSentences,
  ...waveSentences,
  ...textSentences,
  ...documentSentences,
  ...pairSentences,
  ...designSentences,
  ...checkSentences,
} as const;

export type FindingCode = keyof typeof sentences;

import { changeSentences } from './changeSentences';
import { checkSentences } from './checkSentences';
import { choiceSentences } from './choiceSentences';
import { designSentences } from './designSentences';
import { documentSentences } from './documentSentences';
import { pairSentences } from './pairSentences';
import { recordingSentences } from './recordingSentences';
import { residualSentences } from './residualSentences';
import { spectraSentences } from './spectraSentences';
import { textSentences } from './textSentences';
import { timingSentences } from './timingSentences';
import { waveSentences } from './waveSentences';

/** The tables by subject. */
export const tables = [
  recordingSentences,
  waveSentences,
  textSentences,
  documentSentences,
  pairSentences,
  designSentences,
  checkSentences,
  timingSentences,
  changeSentences,
  spectraSentences,
  choiceSentences,
  residualSentences,
];

/** The one table that turns a code into its usual severity and its sentence; values stand in braces. */
export const sentences = {
  ...recordingSentences,
  ...waveSentences,
  ...textSentences,
  ...documentSentences,
  ...pairSentences,
  ...designSentences,
  ...checkSentences,
  ...timingSentences,
  ...changeSentences,
  ...spectraSentences,
  ...choiceSentences,
  ...residualSentences,
} as const;

export type FindingCode = keyof typeof sentences;

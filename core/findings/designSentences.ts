import { table } from './sentence';

/** Findings about the design itself: the pair, the system of equations, the number format, the result. */
export const designSentences = table({
  trivial: {
    severity: 'blocker',
    says: 'the desired signal is the input itself, delayed by {delay}, which lies inside the filter (0 to {last}): one tap of 1 would be the answer. Choose another channel, or for prediction a delay below 0.',
  },
});

import type { Problem } from './problemsOf';

/** What can be done about a problem. */
export type Fix = 'write' | 'relink' | 'open' | 'show';

/** Codes of files that are as they should be once they are written again. */
const mendedByWriting = ['edited', 'missing-output', 'stale-recording', 'stale-document', 'different'];

/** In the order in which they are offered. */
export function fixesOf({ code, at, missing }: Pick<Problem, 'code' | 'at' | 'missing'>): Fix[] {
  if (at === 'array') return mendedByWriting.includes(code) ? ['write', 'open'] : ['open'];
  return missing === null ? ['show', 'open'] : ['relink', 'show', 'open'];
}

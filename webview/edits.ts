import type { Change } from '../core/protocol/messages';

/** Numbers the page's edits, so that echoes of older texts do not overwrite what was entered since. */
export interface Edits {
  /** The next edit to send. */
  next(changes: Change[]): { number: number; changes: Change[] };
  /** True where a document that answers this edit may fill the fields. */
  accepts(answers: number): boolean;
  /** The edit came to nothing: no document will answer it. */
  failed(number: number): void;
  /** The host was asked to say everything again; what it says first is taken as it is. */
  restart(): void;
}

export function newEdits(): Edits {
  let last = 0;
  let awaited = 0;
  let fresh = true;
  return {
    next(changes) {
      last++;
      awaited = last;
      return { number: last, changes };
    },
    accepts(answers) {
      if (fresh) {
        fresh = false;
        if (awaited === 0) last = Math.max(last, answers);
      }
      return answers >= awaited;
    },
    failed(number) {
      if (number === awaited) awaited = 0;
    },
    restart() {
      fresh = true;
      awaited = 0;
    },
  };
}

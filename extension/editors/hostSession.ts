import * as vscode from 'vscode';
import { translatedPhrase } from '../../core/findings/translatePhrase';
import type { Services } from '../services';
import { dictionary } from '../translated';
import { Session } from './session';

let last = 0;

/** A session joined to the worker, the status bar and the log. */
export interface HostSession {
  id: string;
  session: Session;
  dispose(): void;
}

/** @param begin asks the worker to compute a generation */
export function newHostSession(
  { worker, statusBar, log }: Services,
  file: string,
  begin: (id: string, generation: number) => Promise<unknown>,
): HostSession {
  const id = `${++last}`;
  const session = new Session({
    async begin(generation) {
      const begun = performance.now();
      await begin(id, generation);
      log.info(`${file}, generation ${generation}: ${Math.round(performance.now() - begun)} ms`);
    },
    wordsFor(kind, why) {
      log.error(`${file}: ${why}`);
      if (kind === 'restarted') return vscode.l10n.t('The worker ended and was started again: {0}', why);
      if (kind === 'lost') {
        return vscode.l10n.t('The worker ended twice; change something or start it again: {0}', why);
      }
      return vscode.l10n.t('Something went wrong that should not: {0}', why);
    },
    showBusy: (busy) => {
      // A part that has just begun has no words yet.
      const what =
        busy === null || busy.what === '' ? file : `${file}: ${translatedPhrase(busy.what, dictionary())}`;
      statusBar.show(id, busy === null ? null : { what, share: busy.share });
    },
  });
  worker.join(id, session);
  return {
    id,
    session,
    dispose() {
      session.dispose();
      worker.leave(id);
    },
  };
}

import type { Change } from '../core/protocol/messages';
import type { FormView } from '../core/protocol/views';

/**
 * Another coefficient word. Where it changes between integers and floats, the signals' words follow: they have to be of the
 * same kind, and an edit should not leave a document that blocks itself.
 */
export function wordEdit(form: FormView | null, chosen: string): Change[] {
  const word = /^\d/.test(chosen) ? Number(chosen) : chosen;
  const changes: Change[] = [{ path: ['arithmetic', 'word'], value: word }];
  for (const signal of ['input', 'output'] as const) {
    const given = form?.given.includes(`arithmetic/${signal}/word`) ?? false;
    const present = form?.document.arithmetic[signal].word;
    const fits = typeof word === 'number' ? typeof present === 'number' : present === word;
    // A word that is left out follows by itself.
    if (given && !fits) {
      changes.push({ path: ['arithmetic', signal, 'word'], value: typeof word === 'number' ? 16 : word });
    }
  }
  return changes;
}

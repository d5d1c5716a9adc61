import type { TrackEntry } from '../../core/document/pairingDocument';
import type { PageContext, Section } from '../context';
import { newButton } from '../controls';
import { droppedFiles } from '../dropped';
import { el, setText } from '../elements';
import { missingKeys } from '../readable';
import { firstPair } from '../trackEdits';
import { t } from '../words';

/** What to do while the document has no recordings: pick or drop two, or look at the sample bench. */
export function newEmptyState(context: PageContext): Section {
  const said = el('p', { role: 'status' });
  const pick = newButton(t('Pick two recordings…'), () => void pair([null, null]), { primary: true });
  const bench = newButton(t('Open sample bench'), () =>
    context.calls.openSampleBench(null).catch(context.fail),
  );
  const element = el(
    'section',
    { class: 'empty', 'data-section': 'empty' },
    el('h2', {}, t('No recordings yet')),
    el(
      'p',
      {},
      t(
        'Two recordings made at the same time become the pair: an input that the filter will see, and a desired signal that its output should come close to. Pick them, or drop two files here with the Shift key held. WAV, CSV, TSV and NPY are read.',
      ),
    ),
    el('div', { class: 'buttons' }, pick.element, bench.element),
    said,
  );
  element.hidden = true;

  const pair = async (files: (string | null)[]) => {
    const chosen: TrackEntry[] = [];
    for (const [i, file] of files.slice(0, 2).entries()) {
      setText(said, i === 0 ? t('First the input.') : t('Now the desired signal.'));
      const track = await context.calls.pickTrack({ file, role: i === 0 ? 'input' : 'desired' });
      if (track === null) {
        setText(said, t('Nothing was chosen.'));
        return;
      }
      chosen.push(track);
    }
    if (chosen.length < 2) return;
    setText(said, '');
    context.edit(firstPair(chosen[0], chosen[1], missingKeys(context.state()) ?? []));
  };
  element.addEventListener('dragover', (event) => event.preventDefault());
  element.addEventListener('drop', (event) => {
    event.preventDefault();
    const names = droppedFiles(event.dataTransfer?.getData('text/uri-list') ?? '', [
      ...(event.dataTransfer?.files ?? []),
    ]);
    if (names.length === 0) {
      setText(said, t('The drop brought no file. Pick the recordings instead.'));
    } else {
      pair([names[0], names[1] ?? null]).catch(context.fail);
    }
  });
  return {
    element,
    update(state) {
      element.hidden = state.kind !== 'pairing' || missingKeys(state) === null;
    },
  };
}

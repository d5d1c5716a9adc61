import type { TrackEntry } from '../../core/document/pairingDocument';
import type { FileView, FormView } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { newDropdown } from '../controls';
import type { Field } from '../form/fieldBook';
import { newShell } from '../form/shell';
import { valueAt } from '../paths';
import { sameTrack, setTrack, trackChoices } from '../trackEdits';
import { t } from '../words';

const other = 'other';

export interface TrackField extends Field {
  showFiles(files: readonly FileView[]): void;
}

/** Which channel of which file a signal is. */
export function newTrackField(
  path: (string | number)[],
  label: string,
  help: string,
  context: PageContext,
): TrackField {
  let track: TrackEntry = { file: '', channel: 1 };
  let files: readonly FileView[] = [];
  const control = newDropdown(label, (value) => void choose(value));
  const shell = newShell({ label, help }, control.element);

  const choose = async (value: string) => {
    const chosen = value === other ? await pick() : trackChoices(files, track)[Number(value)]?.track;
    if (chosen) context.edit(setTrack(path, track, chosen));
    else show();
  };
  const pick = () =>
    context.calls
      .pickTrack({ file: null, role: path.includes('inputs') ? 'input' : 'desired' })
      .catch((error) => {
        context.fail(error);
        return null;
      });
  const show = () => {
    const choices = trackChoices(files, track);
    control.setChoices([
      ...choices.map((choice, i) => ({ value: String(i), label: choice.label })),
      { value: other, label: t('Other file…') },
    ]);
    control.set(String(choices.findIndex((choice) => sameTrack(choice.track, track, files))));
  };
  return {
    path,
    element: shell.element,
    fill(form: FormView) {
      track = (valueAt(form.document, path) as TrackEntry | undefined) ?? track;
      show();
    },
    showFiles(next) {
      files = next;
      show();
    },
    showFindings: shell.showFindings,
    setDisabled: control.setDisabled,
    focus: () => control.element.focus(),
  };
}

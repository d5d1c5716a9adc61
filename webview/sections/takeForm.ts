import type { FileView, FormView, TakeView } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { newButton } from '../controls';
import { el } from '../elements';
import type { Field } from '../form/fieldBook';
import { newTextField } from '../form/textField';
import { type IntervalKind, intervalRows } from '../intervalEdits';
import { keepFocus } from '../keepFocus';
import { addInput, removeInput, removeTake } from '../trackEdits';
import { t } from '../words';
import { intervalFields } from './intervalFields';
import { newTrackField, type TrackField } from './trackField';

const kinds: readonly IntervalKind[] = ['fit', 'heldOut', 'disturbanceOnly'];

/** The fields of the take that is looked at. */
export interface TakeForm {
  element: HTMLElement;
  update(form: FormView, take: TakeView | null, rate: number | null, files: readonly FileView[]): void;
}

export function newTakeForm(context: PageContext): TakeForm {
  const element = el('div', { class: 'take' });
  let shape = '';
  let outline = '';
  let fields: Field[] = [];
  let tracks: TrackField[] = [];

  const build = (form: FormView, take: TakeView | null, rate: number | null) => {
    const number = context.take();
    const group = fields.findIndex((field) => field.element.contains(document.activeElement));
    for (const field of fields) context.fields.remove(field);
    tracks = trackFields(form, number, context);
    const intervals = kinds.map((kind) => intervalFields({ take: number, kind }, form, take, rate, context));
    const groups = intervals.map(({ group }) => group);
    const name = nameField(number, context);
    fields = [name, ...tracks, ...groups, ...intervals.flatMap((one) => one.fields)];
    const replace = () => {
      element.replaceChildren(
        name.element,
        ...tracks.map((track, i) => withRemove(track, i, form, context)),
        ...takeButtons(form, number, context),
        el('div', { class: 'intervals', 'data-anchor': 'intervals' }, ...groups.map((one) => one.element)),
      );
      for (const field of fields) {
        context.fields.add(field);
        field.fill(form);
      }
    };
    keepFocus(element, replace, () => fields[Math.min(group, fields.length - 1)]?.focus());
  };

  return {
    element,
    update(form, take, rate, files) {
      const number = context.take();
      const entry = form.document.takes[number];
      element.hidden = entry === undefined;
      if (entry === undefined) return;
      const rows = kinds.map((kind) => intervalRows(form, { take: number, kind }, take, rate));
      const nextOutline = JSON.stringify([
        number,
        form.document.takes.length,
        entry.inputs.length,
        rows.map(({ rows: list }) => list.length),
      ]);
      const next = JSON.stringify([
        nextOutline,
        rate,
        kinds.map((kind) => take?.[kind]),
        take?.samples,
        rows.map(({ rows: list, leftOut }) => [leftOut, list.map(({ path, samples }) => [path, samples])]),
      ]);
      // What is being typed would be lost; the fields are the same, and their next change finds what is new.
      const typing = nextOutline === outline && fields.some((field) => field.isOpen?.());
      if (next !== shape && !typing) {
        shape = next;
        outline = nextOutline;
        build(form, take, rate);
      }
      for (const track of tracks) track.showFiles(files);
    },
  };
}

function nameField(take: number, { edit }: PageContext): Field {
  return newTextField(
    {
      path: ['takes', take, 'name'],
      label: t('Name of the take'),
      help: t('Told apart by it in figures and findings.'),
      read: (form) => form.document.takes[take]?.name ?? '',
      show: (value) => value,
      check: (text) => (text.trim() === '' ? { error: t('A take needs a name.') } : { value: text.trim() }),
      changes: (value) => [{ path: ['takes', take, 'name'], value }],
    },
    edit,
  );
}

function trackFields(form: FormView, take: number, context: PageContext): TrackField[] {
  const { inputs } = form.document.takes[take];
  const fields = inputs.map((_input, i) =>
    newTrackField(
      ['takes', take, 'inputs', i],
      inputs.length === 1 ? t('Input') : t('Input {0}', i + 1),
      t('A signal that the filter sees.'),
      context,
    ),
  );
  const desired = newTrackField(
    ['takes', take, 'desired'],
    t('Desired'),
    t("The signal that the filter's output should come close to."),
    context,
  );
  return [...fields, desired];
}

function withRemove(track: TrackField, i: number, form: FormView, context: PageContext): HTMLElement {
  const inputs = form.document.takes[context.take()].inputs.length;
  if (i >= inputs || inputs === 1) return track.element;
  const remove = newButton(t('Remove'), () => {
    const current = context.state().form;
    if (current !== null) context.edit(removeInput(current, i));
  });
  remove.element.setAttribute('aria-label', t('Remove input {0} of every take', i + 1));
  return el('div', { class: 'removable' }, track.element, remove.element);
}

function takeButtons(form: FormView, take: number, context: PageContext): HTMLElement[] {
  const add = newButton(t('Add input…'), async () => {
    const track = await context.calls.pickTrack({ file: null, role: 'input' }).catch(context.fail);
    const current = context.state().form;
    if (track && current !== null) context.edit(addInput(current, take, track));
  });
  if (form.document.takes.length === 1) return [add.element];
  const remove = newButton(t('Remove this take'), () => {
    context.edit(removeTake(take));
    context.chooseTake(Math.max(0, take - 1));
  });
  return [el('div', { class: 'buttons' }, add.element, remove.element)];
}

import type { RecordingsView } from '../../core/protocol/views';
import type { PageContext, Section } from '../context';
import { newButton } from '../controls';
import { el, whenChanged } from '../elements';
import { newNumberField } from '../form/numberField';
import { newTextField } from '../form/textField';
import { dragInterval } from '../intervalEdits';
import { keepFocus } from '../keepFocus';
import { newLanes } from '../plots/lanes';
import type { Lanes } from '../plots/types';
import { freshness, type PageState, viewOf } from '../state';
import { addTake } from '../trackEdits';
import { t } from '../words';
import { newDetails } from './details';
import { newFrame } from './frame';
import { takeLanes } from './laneLabels';
import { fileTable, levelTable } from './levelTable';
import { newTakeForm } from './takeForm';
import { takeTable } from './takeTable';

export interface RecordingsSection extends Section {
  lanes: Lanes;
}

/** The takes, their signals and intervals. */
export function newRecordings(context: PageContext): RecordingsSection {
  const frame = newFrame('recordings', t('Recordings'), ['recordings'], context);
  const takes = el('div');
  const takeForm = newTakeForm(context);
  const tables = el('div');
  const lanes = intervalLanes(context);
  const title = context.fields.add(titleField(context));
  const rate = context.fields.add(rateField(context));
  const add = newButton(t('Add take…'), () => void pickTake(context).catch(context.fail));
  frame.fields.append(title.element, rate.element, takeForm.element);
  frame.plots.append(
    takes,
    el('div', { class: 'buttons' }, add.element),
    frame.follow(lanes.element, 'recordings'),
    frame.follow(newDetails('levels', t('Levels and files'), true, context, tables), 'recordings'),
  );

  const showTakes = whenChanged((_key: string) => {
    const { form } = context.state();
    if (form === null) return;
    const scroll = takes.firstElementChild?.scrollTop ?? 0;
    const table = takeTable(form, viewOf(context.state(), 'recordings'), context);
    keepFocus(takes, () => takes.replaceChildren(table));
    table.scrollTop = scroll;
  });
  const showTables = whenChanged((view: RecordingsView | null) => {
    if (view !== null) tables.replaceChildren(levelTable(view.files), fileTable(view.files));
  });
  const showLanes = whenChanged((_key: string) => showTake(context, lanes));

  return {
    element: frame.element,
    lanes,
    update(state) {
      frame.update(state);
      const { form } = state;
      frame.element.hidden = form === null;
      if (form === null) return;
      const view = viewOf(state, 'recordings');
      const known =
        view?.takes.find(({ name }) => name === form.document.takes[context.take()]?.name) ?? null;
      const current = freshness(state, 'recordings') === 'fresh' ? known : null;
      const stamp = state.parts.recordings?.stamp ?? 0;
      showTakes(JSON.stringify([form.document.takes, context.take(), stamp]));
      takeForm.update(form, current ?? known, view?.sampleRate ?? null, view?.files ?? []);
      showTables(view);
      showLanes(`${stamp} ${context.take()} ${known?.name}`);
    },
  };
}

/** Puts the take that is looked at into its lanes. */
function showTake(context: PageContext, lanes: Lanes): void {
  const state = context.state();
  const view = viewOf(state, 'recordings');
  const name = state.form?.document.takes[context.take()]?.name;
  const number = view?.takes.findIndex((one) => one.name === name) ?? -1;
  if (view === null || number < 0) {
    lanes.show(null);
    return;
  }
  const take = view.takes[number];
  lanes.show(takeLanes(view, take, number, state.parts.recordings?.stamp ?? 0));
  const kept = context.keeper.state.views[`take ${take.name}`];
  if (kept !== undefined && kept.to <= take.samples) lanes.setView(kept);
}

function intervalLanes(context: PageContext): Lanes {
  const shown = (state: PageState) => {
    const view = viewOf(state, 'recordings');
    const name = state.form?.document.takes[context.take()]?.name;
    return { view, take: view?.takes.find((one) => one.name === name) ?? null };
  };
  return newLanes({
    title: t('Waveforms and intervals'),
    envelope: context.envelope,
    onInterval(kind, number, interval) {
      const state = context.state();
      const { view, take } = shown(state);
      if (state.form === null || view === null || take === null) return;
      const list = { take: context.take(), kind };
      context.edit(dragInterval(state.form, list, take[kind][number], interval, take, view.sampleRate));
    },
    onView(view) {
      const { take } = shown(context.state());
      if (take === null) return;
      const { views } = context.keeper.state;
      context.keeper.change({ views: { ...views, [`take ${take.name}`]: { from: view.from, to: view.to } } });
    },
  });
}

function titleField({ edit }: PageContext) {
  return newTextField(
    {
      path: ['title'],
      label: t('Title'),
      help: t('What the pair is, for the design note and the headers of the files.'),
      read: (form) => form.document.title,
      show: (value) => value,
      check: (text) => ({ value: text.trim() }),
      changes: (value) => [value === '' ? { path: ['title'] } : { path: ['title'], value }],
    },
    edit,
  );
}

function rateField({ edit }: PageContext) {
  return newNumberField(
    {
      path: ['sampleRate'],
      label: t('Sample rate'),
      unit: t('Hz'),
      help: t('Samples a second, only where the files do not carry it.'),
      empty: t('as the files say'),
      rule: { min: 0, above: true, max: 1e12, optional: true },
    },
    edit,
  );
}

async function pickTake(context: PageContext): Promise<void> {
  const input = await context.calls.pickTrack({ file: null, role: 'input' });
  if (input === null) return;
  const desired = await context.calls.pickTrack({ file: null, role: 'desired' });
  const { form } = context.state();
  if (desired === null || form === null) return;
  context.edit(addTake(form, input, desired));
  context.chooseTake(form.document.takes.length);
}

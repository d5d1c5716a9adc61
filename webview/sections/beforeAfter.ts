import type { PageContext } from '../context';
import { newDropdown } from '../controls';
import { el, newId, whenChanged } from '../elements';
import { excerptOf } from '../listen/listenPanel';
import { newLanes } from '../plots/lanes';
import { viewOf } from '../state';
import { t } from '../words';
import { extremesOf, runLaneNames, runLanes } from './laneLabels';

/** The waveforms of the filter's run over one take, at first over its held-out stretch. */
export function newBeforeAfter(context: PageContext) {
  const lanes = newLanes({
    title: t('Before and after'),
    envelope: context.envelope,
    onView(view) {
      const name = takeNow()?.take.name;
      if (name === undefined) return;
      const { views } = context.keeper.state;
      context.keeper.change({ views: { ...views, [`run ${name}`]: { from: view.from, to: view.to } } });
    },
  });
  const picker = newDropdown(t('Take shown'), (value) => context.chooseTake(Number(value)));
  picker.element.id = newId('take');
  const label = el('label', { for: picker.element.id }, t('Take shown'));
  const choice = el('div', { class: 'control' }, label, picker.element);

  const takeNow = () => {
    const state = context.state();
    const recordings = viewOf(state, 'recordings');
    const { name } = state.form?.document.takes[context.take()] ?? {};
    const number = recordings?.takes.findIndex((one) => one.name === name) ?? -1;
    return recordings === null || number < 0 ? null : { recordings, take: recordings.takes[number], number };
  };
  let shown = '';
  const show = async (key: string) => {
    shown = key;
    const now = takeNow();
    const job = viewOf(context.state(), 'figures')?.job;
    if (now === null || job === undefined || key === '') return lanes.show(null);
    const { recordings, take, number } = now;
    const { parts } = context.state();
    const stamp = 1e6 * (parts.recordings?.stamp ?? 0) + (parts.evidence?.stamp ?? 0);
    const held = take.heldOut[0] ?? { from: 0, to: take.samples };
    const request = { take: number, lanes: [...runLaneNames], from: held.from, to: held.to, columns: 256 };
    const extremes = extremesOf(await context.envelope(request));
    if (shown !== key) return;
    lanes.show(runLanes(recordings, take, number, stamp, job, extremes));
    const view = context.keeper.state.views[`run ${take.name}`] ?? held;
    if (view.to <= take.samples) lanes.setView(view);
  };
  const follow = whenChanged((key: string) => {
    show(key).catch((error) => {
      // The run of an older document is gone; that of the newer one follows.
      if (shown === key) context.fail(error);
    });
  });
  return {
    element: el('div', {}, choice, lanes.element),
    update() {
      const { form, parts } = context.state();
      const takes = form?.document.takes ?? [];
      choice.hidden = takes.length < 2;
      picker.setChoices(takes.map(({ name }, i) => ({ value: String(i), label: name })));
      picker.set(String(context.take()));
      const key = `${parts.recordings?.stamp} ${parts.evidence?.stamp} ${context.take()} ${takes[context.take()]?.name}`;
      follow(parts.evidence?.view ? key : '');
    },
    /** What is in view, to be heard. */
    excerpt() {
      const now = takeNow();
      const range = excerptOf(lanes.view(), now?.recordings.sampleRate ?? null);
      return now === null || range === null ? null : { take: now.number, ...range };
    },
  };
}

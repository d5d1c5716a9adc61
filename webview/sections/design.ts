import type { ChoiceView } from '../../core/protocol/views';
import type { PageContext, Section } from '../context';
import { el, whenChanged } from '../elements';
import { plain } from '../figures';
import { newPlot } from '../plots/lines';
import { newShadeMap } from '../plots/map';
import type { Axis, MapData } from '../plots/types';
import { viewOf } from '../state';
import { table } from '../tables';
import { t } from '../words';
import { choiceCurves } from './choiceCurves';
import { newDetails } from './details';
import { filterFields } from './filterFields';
import { findingList } from './findingList';
import { newFrame } from './frame';
import { newSuggestion } from './suggestion';

const names = ['length', 'delay', 'regularisation'] as const;

/** Length, delay and regularisation, and the evidence on which to choose them. */
export function newDesign(context: PageContext): Section {
  const frame = newFrame('design', t('Design'), ['choice'], context);
  const suggestion = newSuggestion(context);
  frame.fields.append(...filterFields(context).map(({ element }) => element));
  const plots = names.map((name) =>
    newPlot({
      title: titleOf(name),
      x: axisOf(name),
      y: { label: t('NMSE'), unit: t('dB') },
      onPick: (value) => context.edit([{ path: ['filter', name], value }]),
    }),
  );
  const map = newShadeMap({
    title: t('Cross-validated error by length and delay'),
    x: { label: t('Delay'), unit: t('samples') },
    y: { label: t('Length'), unit: t('taps') },
    valueLabel: t('NMSE (dB)'),
    onPick: (delay, length) =>
      context.edit([
        { path: ['filter', 'length'], value: length },
        { path: ['filter', 'delay'], value: delay },
      ]),
  });
  const opinions = el('div');
  const curves = el(
    'div',
    { 'data-anchor': 'choice' },
    ...plots.map(({ element }) => element),
    map.element,
    opinions,
  );
  frame.plots.append(suggestion.element, frame.follow(curves, 'choice'));

  const show = whenChanged((view: ChoiceView | null) => {
    for (const [i, plot] of plots.entries()) plot.show(view === null ? null : choiceCurves(view, names[i]));
    map.show(view === null ? null : mapOf(view));
    opinions.replaceChildren(
      ...(view === null ? [] : [findingList(view.findings, context), opinionTable(view, context)]),
    );
  });
  return {
    element: frame.element,
    update(state) {
      frame.element.hidden = state.form === null;
      frame.update(state);
      suggestion.update(state);
      show(viewOf(state, 'choice'));
    },
  };
}

function titleOf(name: (typeof names)[number]): string {
  return {
    length: t('Error against length'),
    delay: t('Error against delay'),
    regularisation: t('Error against regularisation'),
  }[name];
}

function axisOf(name: (typeof names)[number]): Axis {
  if (name === 'length') return { label: t('Length'), unit: t('taps'), scale: 'logarithmic' };
  if (name === 'delay') return { label: t('Delay'), unit: t('samples') };
  return { label: t('Regularisation'), unit: '', scale: 'logarithmic' };
}

function mapOf({ lengths, delays, mapDb, present, suggestion }: ChoiceView): MapData | null {
  if (lengths.length < 2 || delays.length < 2) return null;
  const marks: MapData['marks'] = [{ shape: 'now', x: present.delay, y: present.length, label: t('now') }];
  if (suggestion !== null) {
    marks.push({ shape: 'suggested', x: suggestion.delay, y: suggestion.length, label: t('suggested') });
  }
  return { x: delays, y: lengths, values: mapDb, marks };
}

function opinionTable({ opinions }: ChoiceView, context: PageContext): HTMLElement {
  const rows = opinions.map((one) => [
    one.criterion,
    plain(one.length),
    plain(one.delay),
    plain(one.regularisation),
  ]);
  const head = [t('criterion'), t('length'), t('delay'), t('regularisation')];
  const shown = table(t('What each criterion would choose'), head, rows, [1, 2, 3]);
  const details = newDetails('opinions', t('Other criteria'), false, context, shown);
  details.hidden = rows.length === 0;
  return details;
}

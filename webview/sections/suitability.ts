import type { SuitabilityView } from '../../core/protocol/views';
import type { PageContext, Section } from '../context';
import { el, whenChanged } from '../elements';
import { decibels, partsPerMillion, plain } from '../figures';
import { keepFocus } from '../keepFocus';
import { newPlot } from '../plots/lines';
import type { Mark } from '../plots/types';
import { missingKeys } from '../readable';
import { allFindings, freshness, viewOf } from '../state';
import { table } from '../tables';
import { phrase, t } from '../words';
import { findingList, nothingElse } from './findingList';
import { newFrame } from './frame';
import { signalCurves } from './spectrumCurves';

/** What was found in the recordings, and how much of the desired signal any linear filter could reach. */
export function newSuitability(context: PageContext): Section {
  const frame = newFrame('suitability', t('Suitability'), ['suitability'], context);
  const findings = el('div');
  const figures = el('div');
  const coherence = newPlot({
    title: t('Coherence of inputs and desired signal'),
    x: { label: t('Frequency'), unit: t('Hz') },
    y: { label: t('Coherence'), unit: '' },
  });
  const spectra = newPlot({
    title: t('Spectra'),
    x: { label: t('Frequency'), unit: t('Hz') },
    y: { label: t('Power'), unit: t('dB re 1/Hz') },
  });
  coherence.element.dataset.anchor = 'coherence';
  spectra.element.dataset.anchor = 'spectra';
  const bands = el('div');
  frame.fields.append(findings, frame.follow(bands, 'suitability'));
  frame.plots.append(
    frame.follow(coherence.element, 'suitability'),
    frame.follow(spectra.element, 'suitability'),
    frame.follow(figures, 'suitability'),
  );

  const show = whenChanged((view: SuitabilityView | null) => {
    const pair = view?.pair ?? null;
    coherence.show(pair?.coherence ? coherenceCurves(pair) : null);
    spectra.show(pair?.spectrum ? { curves: signalCurves(pair.spectrum), marks: unknown(pair) } : null);
    figures.replaceChildren(...(pair === null ? [] : [timingTable(pair)]));
    bands.replaceChildren(...(pair === null ? [] : attainable(pair)));
  });
  const list = whenChanged((_key: string) => {
    const state = context.state();
    const all = allFindings(state);
    const checks = viewOf(state, 'suitability')?.checks ?? null;
    const fresh = freshness(state, 'suitability') === 'fresh';
    keepFocus(findings, () =>
      findings.replaceChildren(
        findingList(all, context),
        fresh && checks !== null ? nothingElse(all, checks) : '',
      ),
    );
  });
  return {
    element: frame.element,
    update(state) {
      frame.element.hidden =
        state.form === null && (state.findings.length === 0 || missingKeys(state) !== null);
      frame.update(state);
      const view = viewOf(state, 'suitability');
      show(view);
      const takes = viewOf(state, 'recordings')?.takes.length ?? 0;
      list(JSON.stringify([allFindings(state), freshness(state, 'suitability'), takes]));
      // Without a pair there is nothing to draw.
      coherence.element.hidden ||= !view?.pair?.coherence;
      spectra.element.hidden ||= !view?.pair?.spectrum;
    },
  };
}

type Pair = NonNullable<SuitabilityView['pair']>;

function coherenceCurves(pair: Pair) {
  const { frequencies, values, lower, upper, significance, averages } = pair.coherence!;
  const label = t('coherence, {0} averages, with 95 % interval', averages);
  return {
    curves: [{ label, role: 'figure' as const, x: frequencies, y: values, low: lower, high: upper }],
    marks: [
      { kind: 'level' as const, y: significance, label: t('unrelated signals stay below (95 %)') },
      ...unknown(pair),
    ],
  };
}

function unknown({ unknownBands }: Pair): Mark[] {
  return unknownBands.map(({ from, to }) => ({
    kind: 'span',
    from,
    to,
    label: t('the model says nothing here'),
  }));
}

function timingTable(pair: Pair): HTMLElement {
  const takes = pair.takes.map((take) => [
    take.name,
    take.lagSamples === null ? '–' : t('{0} samples', plain(take.lagSamples)),
    partsPerMillion(take.driftPpm, take.driftPpmStandardError),
    decibels(take.attainableDb),
  ]);
  const caption = t('Timing and attainable reduction by take');
  const head = [t('take'), t('lag'), t('drift'), t('attainable')];
  return el('div', { 'data-anchor': 'timing' }, table(caption, head, takes, [1, 2, 3]));
}

function attainable(pair: Pair): HTMLElement[] {
  const whole =
    pair.attainableDb === null
      ? t('Attainable reduction not known: {0}', phrase(pair.reason ?? ''))
      : t('No linear filter takes off more than about {0}.', decibels(pair.attainableDb));
  if (pair.bands.length === 0) return [el('p', {}, whole)];
  const bands = pair.bands.map(({ from, to, attainableDb }) => [
    t('{0} to {1} Hz', plain(from), plain(to)),
    decibels(attainableDb),
  ]);
  const untold = pair.bands.some(({ attainableDb }) => attainableDb === null);
  return [
    el('p', {}, whole),
    table(t('Attainable reduction by band'), [t('band'), t('attainable')], bands, [1]),
    ...(untold ? [el('p', { class: 'rest' }, t('–: too little recorded to tell.'))] : []),
  ];
}

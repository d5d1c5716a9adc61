import type { EvidenceView } from '../../core/protocol/views';
import { el } from '../elements';
import { newPlot } from '../plots/lines';
import { table } from '../tables';
import { phrase, t } from '../words';

/** What is left after the filter: tests, and how it hangs together with itself. */
export function newLeftOver(): { element: HTMLElement; show(view: EvidenceView | null): void } {
  const tests = el('div');
  const plot = newPlot({
    title: t('Correlation of what is left'),
    x: { label: t('Lag'), unit: t('samples') },
    y: { label: t('Correlation'), unit: '' },
  });
  const cautions = el('div');
  const element = el('div', {}, tests, el('div', { 'data-anchor': 'leftOver' }, plot.element), cautions);
  return {
    element,
    show(view) {
      const left = view?.leftOver ?? null;
      plot.element.hidden = left === null;
      plot.show(left === null ? null : plotOf(left));
      tests.replaceChildren(...(view === null || view.residuals.length === 0 ? [] : [testTable(view)]));
      cautions.replaceChildren(...(view === null ? [] : [cautionList(view.cautions)]));
    },
  };
}

function plotOf({ lags, correlation, bound }: NonNullable<EvidenceView['leftOver']>) {
  // At lag 0 it is 1 by definition, which would hide the rest.
  const others = (_value: number, i: number) => lags[i] !== 0;
  const [x, y] = [lags.filter(others), correlation.filter(others)];
  return {
    curves: [{ label: t('left over'), role: 'error' as const, x, y, style: 'stems' as const }],
    marks: [bound, -bound].map((y) => ({ kind: 'level' as const, y, label: t('95 % of white noise') })),
  };
}

function testTable({ residuals }: EvidenceView): HTMLElement {
  const rows = residuals.map(({ test, expected, found, probability }) =>
    [test, expected, found, probability].map(phrase),
  );
  const head = [t('test'), t('expected'), t('found'), t('probability')];
  return table(t('Tests of what is left'), head, rows);
}

function cautionList(cautions: readonly string[]): HTMLElement {
  return el(
    'div',
    { class: 'cautions' },
    el('h3', {}, t('Cautions')),
    el('ul', {}, ...cautions.map((text) => el('li', {}, phrase(text)))),
  );
}

import type { EvidenceView } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { newDropdown } from '../controls';
import { el, newId } from '../elements';
import { newPlot } from '../plots/lines';
import type { Curve, Plot } from '../plots/types';
import { phrase, t } from '../words';
import { newDetails } from './details';
import { inputName } from './signalNames';

/** Taps and response of one input's filter at a time. */
export function newResponsePlots(context: PageContext): {
  element: HTMLElement;
  show(view: EvidenceView | null): void;
} {
  const frequency = { label: t('Frequency'), unit: t('Hz') };
  const impulse = newPlot({
    title: t('Impulse response'),
    x: { label: t('Tap'), unit: '' },
    y: { label: t('Coefficient'), unit: '' },
  });
  impulse.element.dataset.anchor = 'impulse';
  const magnitude = newPlot({
    title: t('Magnitude'),
    x: frequency,
    y: { label: t('Magnitude'), unit: t('dB') },
  });
  const phase = newPlot({ title: t('Phase'), x: frequency, y: { label: t('Phase'), unit: '°' } });
  const delay = newPlot({
    title: t('Group delay'),
    x: frequency,
    y: { label: t('Group delay'), unit: t('samples') },
  });
  let view: EvidenceView | null = null;
  let input = 0;
  const picker = newDropdown(t('Filter of'), (value) => {
    input = Number(value);
    draw();
  });
  picker.element.id = newId('filter');
  const choice = el(
    'div',
    { class: 'control' },
    el('label', { for: picker.element.id }, t('Filter of')),
    picker.element,
  );
  const withheld = el('p', { class: 'rest' });
  const more = newDetails('phase', t('Phase and group delay'), false, context, phase.element, delay.element);

  const draw = () => {
    const taps = view?.impulses[input] ?? null;
    const response = view?.responses[input] ?? null;
    const reason = view?.errorsWithheld ?? null;
    withheld.textContent = reason === null ? '' : t('No error bars: {0}.', phrase(reason));
    const label = inputName(taps?.label ?? '', input, view?.impulses.length ?? 0);
    impulse.show(taps === null ? null : { curves: [{ ...stems(taps), label }], marks: [] });
    if (response === null) {
      for (const plot of [magnitude, phase, delay]) plot.show(null);
      return;
    }
    const { frequencies: x, magnitudeDb, lowDb, highDb } = response;
    line(magnitude, { label, role: 'figure', x, y: magnitudeDb, low: lowDb, high: highDb });
    line(phase, { label, role: 'figure', x, y: response.phase });
    line(delay, { label, role: 'figure', x, y: response.groupDelay });
  };
  return {
    element: el('div', {}, choice, impulse.element, withheld, magnitude.element, more),
    show(next) {
      view = next;
      const inputs = view?.impulses ?? [];
      input = Math.min(input, Math.max(0, inputs.length - 1));
      choice.hidden = inputs.length < 2;
      picker.setChoices(
        inputs.map(({ label }, i) => ({ value: String(i), label: inputName(label, i, inputs.length) })),
      );
      picker.set(String(input));
      draw();
    },
  };
}

function stems({ label, values, standardErrors }: EvidenceView['impulses'][number]): Curve {
  const x = Float64Array.from(values, (_value, k) => k);
  return { label, role: 'figure', x, y: values, errors: standardErrors, style: 'stems' };
}

function line(plot: Plot, curve: Curve): void {
  plot.show({ curves: [curve], marks: [] });
}

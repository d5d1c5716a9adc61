import type { EvidenceView } from '../../core/protocol/views';
import type { PageContext, Section } from '../context';
import { el, whenChanged } from '../elements';
import { newListenPanel } from '../listen/listenPanel';
import { newPlot } from '../plots/lines';
import { viewOf } from '../state';
import { t } from '../words';
import { newBeforeAfter } from './beforeAfter';
import { figureTables } from './figureTable';
import { newFrame } from './frame';
import { newLeftOver } from './leftOver';
import { newResponsePlots } from './responsePlots';
import { spectrumCurves } from './spectrumCurves';

/** What the filter is worth on data that the fit never saw. */
export function newEvidence(context: PageContext): Section {
  const frame = newFrame('evidence', t('Evidence'), ['evidence', 'figures'], context);
  const tables = el('div');
  const before = newBeforeAfter(context);
  const spectrum = newPlot({
    title: t('Spectra before and after'),
    x: { label: t('Frequency'), unit: t('Hz') },
    y: { label: t('Power'), unit: t('dB re 1/Hz') },
  });
  const responses = newResponsePlots(context);
  const leftOver = newLeftOver();
  const listen = newListenPanel(context, before.excerpt);
  frame.fields.append(frame.follow(tables, 'evidence'), listen.element);
  for (const element of [before.element, spectrum.element, responses.element, leftOver.element]) {
    frame.plots.append(frame.follow(element, 'evidence'));
  }
  const show = whenChanged((view: EvidenceView | null) => {
    tables.replaceChildren(...(view === null ? [] : figureTables(view)));
    spectrum.show(view === null ? null : { curves: spectrumCurves(view.spectrum), marks: [] });
    responses.show(view);
    leftOver.show(view);
  });
  return {
    element: frame.element,
    update(state) {
      frame.element.hidden = state.form === null;
      frame.update(state);
      show(viewOf(state, 'evidence'));
      before.update();
      listen.update(state);
      listen.element.hidden ||= viewOf(state, 'evidence') === null;
    },
  };
}

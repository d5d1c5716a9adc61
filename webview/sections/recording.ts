import type { RecordingView } from '../../core/protocol/views';
import type { PageContext, Section } from '../context';
import { newButton } from '../controls';
import { el, whenChanged } from '../elements';
import { newLanes } from '../plots/lanes';
import { newPlot } from '../plots/lines';
import type { Lanes, LanesData } from '../plots/types';
import { freshness, viewOf } from '../state';
import { t } from '../words';
import { findingList, nothingElse } from './findingList';
import { newFrame } from './frame';
import { fileTable, levelTable } from './levelTable';
import { channelName } from './signalNames';
import { spectrumCurves } from './spectrumCurves';

/** A recording by itself: levels, waveform, spectrum, findings, and the way to a pair. */
export function newRecording(context: PageContext): Section & { lanes: Lanes } {
  const frame = newFrame('recording', t('Recording'), ['recording'], context);
  const pair = newButton(t('Pair with…'), () => context.calls.pairWith(null).catch(context.fail), {
    primary: true,
  });
  const tables = el('div');
  const findings = el('div');
  const lanes = newLanes({
    title: t('Waveform'),
    envelope: context.envelope,
    onView: (view) => context.keeper.change({ views: { recording: { from: view.from, to: view.to } } }),
  });
  const spectrum = newPlot({
    title: t('Spectrum'),
    x: { label: t('Frequency'), unit: t('Hz') },
    y: { label: t('Power'), unit: t('dB re 1/Hz') },
  });
  // Hertz would be a lie where the file does not say its rate.
  const relative = newPlot({
    title: t('Spectrum'),
    x: { label: t('Frequency'), unit: t('cycles a sample') },
    y: { label: t('Power'), unit: t('dB re 1 a cycle a sample') },
  });
  spectrum.element.dataset.anchor = 'spectra';
  frame.fields.append(el('div', { class: 'buttons' }, pair.element), findings);
  for (const element of [lanes.element, spectrum.element, relative.element, tables]) {
    frame.plots.append(frame.follow(element, 'recording'));
  }
  const show = whenChanged((view: RecordingView | null) => {
    if (view === null) return;
    const { file } = view;
    findings.replaceChildren(findingList(view.findings, context), nothingElse(view.findings, view.checks));
    tables.replaceChildren(...(file === null ? [] : [levelTable([file]), fileTable([file])]));
    lanes.show(file === null ? null : channelLanes(file, context.state().parts.recording?.stamp ?? 0));
    const kept = context.keeper.state.views.recording;
    if (file !== null && kept !== undefined && kept.to <= file.samples) lanes.setView(kept);
    const curves = view.spectrum === null ? [] : spectrumCurves(view.spectrum);
    const named = curves.map((curve) => ({ ...curve, label: channelName(curve.label) }));
    const known = file?.sampleRate != null;
    spectrum.show(known && named.length > 0 ? { curves: named, marks: [] } : null);
    relative.show(!known && named.length > 0 ? { curves: named, marks: [] } : null);
  });
  return {
    element: frame.element,
    lanes,
    update(state) {
      frame.update(state);
      const view = viewOf(state, 'recording');
      show(view);
      lanes.element.hidden ||= view?.file === null;
      const rate = view?.file?.sampleRate ?? null;
      spectrum.element.hidden ||= view?.spectrum === null || rate === null;
      relative.element.hidden ||= view?.spectrum === null || rate !== null;
      pair.setDisabled(freshness(state, 'recording') !== 'fresh' || view?.file === null);
    },
  };
}

function channelLanes(file: NonNullable<RecordingView['file']>, stamp: number): LanesData {
  const lanes = file.channels.map(({ label, min, max }, i) => ({
    lane: `channel:${i}`,
    label: channelName(label),
    role: 'desired' as const,
    min: min ?? -1,
    max: max ?? 1,
  }));
  const take = {
    name: file.file,
    samples: file.samples,
    tracks: [],
    fit: [],
    heldOut: [],
    disturbanceOnly: [],
  };
  return { take, takeNumber: 0, sampleRate: file.sampleRate, lanes, stamp };
}

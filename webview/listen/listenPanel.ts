import type { Job } from '../../core/document/pairingDocument';
import type { Excerpt } from '../../core/protocol/messages';
import { unpack } from '../../core/protocol/pack';
import type { PageContext } from '../context';
import { newButton } from '../controls';
import { el, newId, setText } from '../elements';
import { plain } from '../figures';
import type { PageState } from '../state';
import { viewOf } from '../state';
import { t } from '../words';
import { newPlayer } from './player';
import { canBeHeard, excerptSeconds, largestOf, toSound } from './scale';

const startGain = 0.1;

interface Sound {
  lane: string;
  label: string;
  /** Lanes that share its scale, so that before and after compare by ear. */
  scale: string[];
}

/** Buttons that play an excerpt of the input, the desired signal and the result. */
export function newListenPanel(
  context: PageContext,
  excerpt: () => { take: number; from: number; to: number } | null,
): { element: HTMLElement; update(state: PageState): void } {
  const player = newPlayer(startGain);
  const said = el('p', { role: 'status' });
  const buttons = el('div', { class: 'buttons' });
  const gain = el('input', { type: 'range', min: '0', max: '1', step: '0.01', id: newId('gain') });
  gain.value = String(startGain);
  gain.addEventListener('input', () => player.setGain(Number(gain.value)));
  const stop = newButton(t('Stop playing'), () => {
    player.stop();
    setText(said, '');
  });
  const element = el(
    'div',
    { class: 'listen' },
    el('h3', {}, t('Listen')),
    el(
      'p',
      { class: 'rest' },
      t(
        'Start with a low volume: the loudest value becomes full scale, the same for the desired signal and the result, and the input has its own. A filter can turn noise into something loud.',
      ),
    ),
    buttons,
    el('div', { class: 'control' }, el('label', { for: gain.id }, t('Volume')), gain),
    said,
  );
  let job: Job | null = null;

  const play = async ({ lane, label, scale }: Sound) => {
    const range = excerpt();
    if (range === null) return setText(said, t('Nothing is in view to be played.'));
    setText(said, t('Fetching {0}…', label));
    const packed = await context.calls.excerpt({
      take: range.take,
      lanes: scale,
      from: range.from,
      to: range.to,
    });
    const { sampleRate, lanes } = unpack<Excerpt>(packed);
    const largest = largestOf(lanes.map(({ samples }) => samples));
    const samples = lanes.find((one) => one.lane === lane)?.samples ?? new Float64Array(0);
    player.play(toSound(samples, largest), sampleRate, () => setText(said, ''));
    setText(said, t('Playing {0}, {1} s.', label, plain(samples.length / sampleRate, 3)));
  };
  return {
    element,
    update(state) {
      const rate = viewOf(state, 'recordings')?.sampleRate ?? null;
      element.hidden = !canBeHeard(rate);
      const next = state.form?.document.job ?? null;
      if (next === null || next === job) return;
      job = next;
      const sounds = soundsOf(next);
      const play1 = (sound: Sound) =>
        newButton(t('Play {0}', sound.label), () => void play(sound).catch(context.fail)).element;
      buttons.replaceChildren(...sounds.map(play1), stop.element);
    },
  };
}

function soundsOf(job: Job): Sound[] {
  const result =
    job === 'cancel'
      ? { lane: 'error', label: t('cleaned') }
      : { lane: 'output', label: job === 'predict' ? t('forecast') : t('output') };
  const scale = ['desired', result.lane];
  return [
    { lane: 'input:0', label: t('input'), scale: ['input:0'] },
    { lane: 'desired', label: t('desired'), scale },
    { ...result, scale },
  ];
}

/** What is in view, or its start where that is longer than an excerpt. */
export function excerptOf(view: { from: number; to: number } | null, sampleRate: number | null) {
  if (view === null || sampleRate === null) return null;
  return { from: view.from, to: Math.min(view.to, view.from + Math.floor(excerptSeconds * sampleRate)) };
}

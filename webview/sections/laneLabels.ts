import type { Job } from '../../core/document/pairingDocument';
import type { Envelope } from '../../core/protocol/messages';
import type { RecordingsView, TakeView } from '../../core/protocol/views';
import type { LanesData } from '../plots/types';
import { t } from '../words';

/** Lanes of a take: its inputs and its desired signal. */
export function takeLanes(
  view: RecordingsView,
  take: TakeView,
  takeNumber: number,
  stamp: number,
): LanesData {
  const single = take.tracks.filter(({ role }) => role === 'input').length === 1;
  const inputName = (index: number) => (single ? t('input') : t('input {0}', index + 1));
  const lanes = take.tracks.map(({ role, index, file, channel, min, max }) => ({
    lane: role === 'input' ? `input:${index}` : 'desired',
    label: t('{0}: {1} · {2}', role === 'input' ? inputName(index) : t('desired'), file, channel),
    role,
    min,
    max,
  }));
  return { take, takeNumber, sampleRate: view.sampleRate, lanes, stamp };
}

/** Lanes of the filter's run. */
export const runLaneNames = ['target', 'output', 'error'] as const;

type Extremes = { lane: string; min: number; max: number };

/** The lowest and highest value of each lane. */
export function extremesOf({ lanes }: Envelope): Extremes[] {
  return lanes.map(({ lane, low, high }) => {
    let min = Number.POSITIVE_INFINITY;
    let max = Number.NEGATIVE_INFINITY;
    // Comparisons that NaN never wins.
    for (const value of low) if (value < min) min = value;
    for (const value of high) if (value > max) max = value;
    return { lane, min, max };
  });
}

/**
 * What was asked, what came out, what is left. Before and after share a scale, so that they compare: that is the desired
 * signal with the error where a disturbance is cancelled, which a wanted signal may dwarf, and otherwise all three.
 */
export function runLanes(
  view: RecordingsView,
  take: TakeView,
  takeNumber: number,
  stamp: number,
  job: Job,
  extremes: readonly Extremes[],
): LanesData {
  const apart = (lane: string) => job === 'cancel' && lane === 'output';
  const shared = extremes.filter(({ lane }) => !apart(lane));
  const scaleOf = (lane: string) => {
    const scale = apart(lane) ? extremes.filter((one) => one.lane === lane) : shared;
    const min = Math.min(...scale.map((one) => one.min));
    const max = Math.max(...scale.map((one) => one.max));
    return Number.isFinite(min) && Number.isFinite(max) ? { min, max } : { min: -1, max: 1 };
  };
  const lanes: LanesData['lanes'] = [
    { lane: 'target', label: t('desired, delayed'), role: 'desired', ...scaleOf('target') },
    { lane: 'output', label: t('output'), role: 'output', ...scaleOf('output') },
    { lane: 'error', label: t('error'), role: 'error', ...scaleOf('error') },
  ];
  return { take, takeNumber, sampleRate: view.sampleRate, lanes, stamp };
}

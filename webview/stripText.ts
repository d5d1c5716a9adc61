import type { Job } from '../core/document/pairingDocument';
import type { FileView } from '../core/protocol/views';
import { count, decibels, macsPerSecond, plain } from './figures';
import { missingKeys } from './readable';
import { allFindings, type Freshness, freshness, type PageState, viewOf, wasStopped } from './state';
import { phrase, placeOf, t, textOf } from './words';

/** What the strip says. */
export interface StripText {
  title: string;
  figures: { text: string; freshness: Freshness }[];
  /** Why there is no result, or how old it is; null where the figures are true of the document. */
  why: string | null;
  findings: string;
  files: { text: string; freshness: Freshness } | null;
}

/** The field's term for a job. */
export function jobInWords(job: Job): string {
  return {
    cancel: t('noise cancelling'),
    identify: t('system identification'),
    equalise: t('equalisation'),
    predict: t('linear prediction'),
  }[job];
}

export function stripText(state: PageState): StripText {
  if (state.kind === 'recording') return recordingText(state);
  const { form } = state;
  return {
    title: form === null ? state.file : `${form.document.title} · ${jobInWords(form.document.job)}`,
    figures: figures(state),
    why: why(state),
    findings: findings(state, 'suitability'),
    files: files(state),
  };
}

/** Of a recording by itself: what it is. */
function recordingText(state: PageState): StripText {
  const how = freshness(state, 'recording');
  const view = viewOf(state, 'recording');
  const file = view?.file ?? null;
  const texts = file === null ? [] : [phrase(file.format), ...shapeOf(file)];
  const isGone = view?.findings.some(({ code }) => code === 'missing-file') ?? false;
  const unread = isGone
    ? t('The file is no longer there: deleted, moved or renamed.')
    : t('The recording cannot be read.');
  const broken = how === 'fresh' && file === null ? unread : null;
  return {
    title: state.file,
    figures: texts.map((text) => ({ text, freshness: how })),
    why: how === 'awaited' ? t('Being read.') : broken,
    findings: findings(state, 'recording'),
    files: null,
  };
}

function shapeOf({ samples, sampleRate, channels }: FileView): string[] {
  const number = channels.length === 1 ? t('1 channel') : t('{0} channels', channels.length);
  if (sampleRate === null) return [number, t('{0} samples', count(samples))];
  return [number, t('{0} Hz', plain(sampleRate, 8)), t('{0} s', plain(samples / sampleRate))];
}

function figures(state: PageState): StripText['figures'] {
  const list: StripText['figures'] = [];
  const fast = viewOf(state, 'figures');
  if (fast !== null) {
    const text =
      fast.heldOutDb === null
        ? t('nothing held out, fit {0}', decibels(fast.fitDb))
        : t('held-out {0}', decibels(fast.heldOutDb));
    const words = fast.provisional ? t('{0} (provisional)', text) : text;
    list.push({ text: words, freshness: freshness(state, 'figures') });
    if (!fast.trustworthy && fast.heldOutDb !== null) {
      list.push({
        text: t('(wanted signal included: not the worth of the filter)'),
        freshness: freshness(state, 'figures'),
      });
    }
  }
  const evidence = viewOf(state, 'evidence');
  if (evidence !== null) {
    const text =
      evidence.limitDb === null ? t('limit not known') : t('limit about {0}', decibels(evidence.limitDb));
    list.push({ text, freshness: freshness(state, 'evidence') });
  }
  const firmware = viewOf(state, 'firmware');
  if (firmware !== null && firmware.lossDb !== null) {
    const text = t('{0} loss {1}', phrase(firmware.word), decibels(firmware.lossDb, 2));
    list.push({ text, freshness: freshness(state, 'firmware') });
  }
  if (fast !== null) list.push({ text: taps(fast), freshness: freshness(state, 'figures') });
  if (firmware !== null) {
    list.push({ text: macsPerSecond(firmware.macsPerSecond), freshness: freshness(state, 'firmware') });
  }
  return list;
}

function taps({ taps, inputs }: { taps: number; inputs: number }): string {
  return inputs === 1 ? t('{0} taps', count(taps)) : t('{0} × {1} taps', inputs, count(taps));
}

function why(state: PageState): string | null {
  if (missingKeys(state) !== null) return t('No recordings yet.');
  const how = freshness(state, 'figures');
  if (how === 'fresh') return null;
  const older = viewOf(state, 'figures') !== null;
  const blocker = allFindings(state).find(({ severity }) => severity === 'blocker');
  const tail = older ? ` ${t('The figures shown are of an earlier state.')}` : '';
  if (how === 'computing') return t('Being computed anew; the figures shown are of an earlier state.');
  if (how === 'awaited') return t('Being computed.');
  if (blocker) {
    const place = placeOf(blocker);
    return t('No result: {0}', (place === '' ? '' : `${place}: `) + textOf(blocker)) + tail;
  }
  if (wasStopped(state)) return t('Stopped before there was a result.') + tail;
  return state.trouble === null ? t('No result.') + tail : t('No result: {0}', state.trouble) + tail;
}

function findings(state: PageState, part: 'suitability' | 'recording'): string {
  const all = allFindings(state);
  const number = (severity: string) => all.filter((found) => found.severity === severity).length;
  const blockers = number('blocker');
  const cautions = number('caution');
  const parts: string[] = [];
  if (blockers > 0) parts.push(`■ ${blockers === 1 ? t('1 blocker') : t('{0} blockers', blockers)}`);
  if (cautions > 0) parts.push(`▲ ${cautions === 1 ? t('1 caution') : t('{0} cautions', cautions)}`);
  if (parts.length > 0) return parts.join(', ');
  return freshness(state, part) === 'fresh' ? `● ${t('no cautions')}` : t('not yet inspected');
}

function files(state: PageState): StripText['files'] {
  const firmware = viewOf(state, 'firmware');
  if (firmware === null) return null;
  const text = {
    current: t('files written match these recordings'),
    stale: t('files written no longer match'),
    'not-written': t('nothing written yet'),
  }[firmware.state];
  return { text, freshness: freshness(state, 'firmware') };
}

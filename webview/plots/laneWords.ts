import type { Interval } from '../../core/pair/intervals';
import { t } from '../words';
import type { LanesData } from './data';
import { valueAt } from './envelopeColumns';
import type { End, Intervals } from './intervalEnds';
import type { LaneSource } from './laneSource';
import { kindNames } from './laneTables';
import type { View } from './sampleView';
import { placeInTime, plain } from './shown';

/** A place with its unit: `1.25 s`, `2,500 samples`. */
export function placeWords(sample: number, sampleRate: number | null, resolution: number): string {
  const place = placeInTime(sample, sampleRate, resolution);
  return sampleRate === null ? t('sample {0}', place) : t('{0} s', place);
}

/** `In view: 0 s to 60 s`. */
export function viewWords(view: View, { sampleRate }: LanesData, resolution: number): string {
  const words = (sample: number) => placeWords(sample, sampleRate, resolution);
  return t('In view: {0} to {1}', words(view.from), words(view.to));
}

/** `fit 1: 10 s to 50 s`, for what was led to without its name. */
export function ledWords(span: Interval, { sampleRate }: LanesData): string {
  const words = (sample: number) => placeWords(sample, sampleRate, 1);
  return t('Marked: {0} to {1}', words(span.from), words(span.to));
}

/** The place of the reading line and the values there; lowest and highest where a column holds several samples. */
export function cursorWords(sample: number, { lanes, sampleRate }: LanesData, source: LaneSource): string {
  const fine = source.fine();
  const coarse = source.coarse();
  const values = lanes.flatMap(({ lane, label }) => {
    for (const envelope of [fine, coarse]) {
      const number = envelope?.lanes.findIndex((other) => other.lane === lane) ?? -1;
      const value = envelope === null || number < 0 ? null : valueAt(envelope, number, sample);
      if (value === null) continue;
      const low = plain(value.low);
      return [
        value.low === value.high ? `${label} ${low}` : t('{0} {1} to {2}', label, low, plain(value.high)),
      ];
    }
    return [];
  });
  return `${placeWords(sample, sampleRate, fine?.step ?? 1)}: ${values.join('; ')}`;
}

/** What a handle is called; numbered where there are several of its kind. */
export function endLabel({ kind, number, end }: End, intervals: Intervals): string {
  const name = kindNames()[kind];
  const which = intervals[kind].length > 1 ? `${name} ${number + 1}` : name;
  return end === 'from' ? t('Start of {0}', which) : t('End of {0}', which);
}

import { grouped } from '../../core/figures/numbers';
import { t } from '../words';
import type { Kind, LanesData } from './data';
import { type Intervals, kinds } from './intervalEnds';
import { placeInTime, plain } from './shown';
import type { TableData } from './tableTwin';

/** What the kinds of intervals are called. */
export function kindNames(): Record<Kind, string> {
  return { fit: t('fit'), heldOut: t('held-out'), disturbanceOnly: t('disturbance only') };
}

/** The levels of the lanes and the intervals of the take. */
export function laneTables(
  title: string,
  { lanes, sampleRate }: LanesData,
  intervals: Intervals,
): TableData[] {
  const text = (label: string) => ({ label, show: String });
  const level = (label: string) => ({ label, show: (value: number) => plain(value, 4) });
  const names = kindNames();
  const rows = kinds.flatMap((kind) => intervals[kind].map((interval) => ({ kind, ...interval })));
  const sample = (label: string) => ({ label, show: (value: number) => grouped(value) });
  const second = (label: string) => ({ label, show: (value: number) => placeInTime(value, 1, 0.001) });
  const seconds = sampleRate === null ? [] : [second(t('From (s)')), second(t('To (s)'))];
  return [
    {
      caption: t('{0}: levels', title),
      columns: [text(t('Signal')), level(t('Lowest')), level(t('Highest'))],
      rows: lanes.length,
      row: (i) => [lanes[i].label, lanes[i].min, lanes[i].max],
    },
    {
      caption: t('{0}: intervals', title),
      columns: [
        text(t('Interval')),
        sample(t('From (sample)')),
        sample(t('To (sample)')),
        sample(t('Samples')),
        ...seconds,
      ],
      rows: rows.length,
      row(i) {
        const { kind, from, to } = rows[i];
        const times = sampleRate === null ? [] : [from / sampleRate, to / sampleRate];
        return [names[kind], from, to, to - from, ...times];
      },
    },
  ];
}
